import { joinWords } from '#shared/domain/format.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';

/** A neighbouring version, as far as a citation needs it. */
export interface VersionRef {
  version: number;
  doi: string | null;
}

/** One public version of an entry, as it is cited. Every format is written from this and nothing else. */
export interface CitationRecord {
  accession: string;
  version: number;
  state: 'frozen' | 'superseded' | 'withdrawn';
  /** In the contributor's own words. */
  title: string;
  /** Names as they are to be cited: one string each, never taken apart into given and family names. */
  contributors: readonly { name: string; orcid: string | null }[];
  organisation: string;
  device: { name: string; provider: string; modality: string };
  gateClass: { id: string; title: string };
  register: readonly string[];
  method: string;
  /** ISO 8601, UTC: became public; first and last circuit run. */
  frozenAt: string;
  startedAt: string;
  endedAt: string;
  /** SPDX id. */
  licence: string;
  contentId: string;
  /** Size of the dataset file. */
  bytes: number;
  /** Where readers reach the registry, without a trailing slash. */
  registry: string;
  /** Without "https://doi.org/"; null while none is registered. */
  doi: string | null;
  previous: VersionRef | null;
  next: VersionRef | null;
  withdrawn: { at: string; reason: string } | null;
}

export const publisher = 'Evenbeam';

/** Set aside for trials and never given out to a publisher: DOIs under it resolve nowhere. Memory. */
export const trialPrefix = '10.5072';
export const resolves = (doi: string): boolean => !doi.startsWith(`${trialPrefix}/`);

export const nameOf = ({ accession, version }: Pick<CitationRecord, 'accession' | 'version'>): string => versionedAccessionOf(accession, version);
export const entryUrl = ({ registry, accession }: Pick<CitationRecord, 'registry' | 'accession'>): string => `${registry}/entries/${accession}`;
export const versionUrl = (record: Pick<CitationRecord, 'registry' | 'accession'>, version: number): string => `${entryUrl(record)}/v/${version}`;
export const pageUrl = (record: CitationRecord): string => versionUrl(record, record.version);
export const apiUrl = ({ registry, accession, version }: CitationRecord): string => `${registry}/api/v1/entries/${accession}/v/${version}`;

/** The address to cite by: the DOI where it resolves, else the version's own page, which is kept for ever too. */
export const citeUrl = (record: CitationRecord): string => (record.doi && resolves(record.doi) ? `https://doi.org/${record.doi}` : pageUrl(record));

export const yearOf = ({ frozenAt }: CitationRecord): string => frozenAt.slice(0, 4);
export const dayOf = (instant: string): string => instant.slice(0, 10);

/** What was measured, then the contributor's own title: "Spring run" alone would say nothing in a list of references. */
export const citedTitle = ({ device, gateClass, register, title }: CitationRecord): string =>
  `${device.name}, ${gateClass.title.charAt(0).toLowerCase()}${gateClass.title.slice(1)}, ${register.length === 1 ? 'qubit' : 'qubits'} ${joinWords([...register])}: ${title}`;

/** Two or three plain sentences on what the data is. */
export const abstractOf = (record: CitationRecord): string => {
  const { device, gateClass, register, method, withdrawn } = record;
  const what = `Raw counts of random circuits run on ${device.name} of ${device.provider} (${gateClass.title}; register ${joinWords([...register])}), with the error figures that the linear method ${method} estimates from them and their bootstrap intervals. Reviewed by a curator of another organisation and frozen as ${nameOf(record)}.`;
  return withdrawn ? `Withdrawn on ${dayOf(withdrawn.at)}: ${withdrawn.reason} The data is no longer handed out. ${what}` : what;
};

export const keywordsOf = ({ device, gateClass }: CitationRecord): string[] => ['quantum gates', 'gate characterisation', 'error rates', device.modality, gateClass.id, device.name];
export const orcidUrl = (orcid: string): string => `https://orcid.org/${orcid}`;

const creativeCommons = /^CC-(BY(?:-NC)?(?:-ND|-SA)?)-(\d\.\d)$/;

/** The licence's own address: the licence text for Creative Commons, the SPDX page for all others. */
export const licenceUrl = (spdxId: string): string => {
  if (spdxId === 'CC0-1.0') return 'https://creativecommons.org/publicdomain/zero/1.0/';
  const cc = creativeCommons.exec(spdxId);
  return cc ? `https://creativecommons.org/licenses/${(cc[1] ?? '').toLowerCase()}/${cc[2]}/` : `https://spdx.org/licenses/${encodeURIComponent(spdxId)}.html`;
};

/** One line: line ends, control and direction characters never reach a format in which they mean something. */
export const oneLine = (text: string): string => text.replace(/[\s\u0000-\u001f\u007f-\u009f\u2028-\u202e\u2066-\u2069\ufeff]+/g, ' ').trim();
