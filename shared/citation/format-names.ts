/** The forms in which a citation is given out as a file. */
export const citationFormatNames = ['bibtex', 'ris', 'csl', 'cff', 'datacite', 'datacite-xml'] as const;
export type CitationFormatName = (typeof citationFormatNames)[number];
