import { bibtexText } from './bibtex.ts';
import { cffText } from './cff.ts';
import { cslText } from './csl.ts';
import { dataciteXml } from './datacite-xml.ts';
import { dataciteText } from './datacite.ts';
import type { CitationFormatName } from './format-names.ts';
import { risText } from './ris.ts';
import type { CitationRecord } from './record.ts';

export interface CitationFormat {
  /** On screen. */
  label: string;
  mediaType: string;
  /** Of the file: "EVB-000042.2" with this behind it. */
  extension: string;
  write: (record: CitationRecord) => string;
}

/** Every form in which a citation is given out. */
export const citationFormats: Readonly<Record<CitationFormatName, CitationFormat>> = {
  bibtex: { label: 'BibTeX', mediaType: 'application/x-bibtex', extension: '.bib', write: bibtexText },
  ris: { label: 'RIS', mediaType: 'application/x-research-info-systems', extension: '.ris', write: risText },
  csl: { label: 'CSL JSON', mediaType: 'application/vnd.citationstyles.csl+json', extension: '.csl.json', write: cslText },
  cff: { label: 'CFF', mediaType: 'application/yaml', extension: '.CITATION.cff', write: cffText },
  datacite: { label: 'DataCite JSON', mediaType: 'application/vnd.datacite.datacite+json', extension: '.datacite.json', write: dataciteText },
  'datacite-xml': { label: 'DataCite XML', mediaType: 'application/vnd.datacite.datacite+xml', extension: '.datacite.xml', write: dataciteXml },
};
