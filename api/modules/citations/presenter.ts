import type { Citation } from '#shared/contracts/citations.ts';
import { citationFormatNames } from '#shared/citation/format-names.ts';
import { citationFormats } from '#shared/citation/formats.ts';
import { citeUrl, nameOf, resolves, type CitationRecord } from '#shared/citation/record.ts';
import { citationLine, styleNames } from '#shared/citation/styles.ts';

const styleLabels = { apa: 'APA', harvard: 'Harvard', vancouver: 'Vancouver' } as const;

export const presentCitation = (record: CitationRecord): Citation => ({
  name: nameOf(record),
  url: citeUrl(record),
  doi: record.doi ? { value: record.doi, resolves: resolves(record.doi) } : null,
  styles: styleNames.map((style) => ({ style, label: styleLabels[style], text: citationLine(record, style) })),
  formats: citationFormatNames.map((format) => ({ format, label: citationFormats[format].label, mediaType: citationFormats[format].mediaType, href: `/api/v1/entries/${record.accession}/v/${record.version}/citation?format=${format}` })),
});
