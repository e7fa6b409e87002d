/** Public names of things: fixed patterns, six digits, never reused. */
const sixDigits = (n: number): string => String(n).padStart(6, '0');

export const accessionOf = (n: number): string => `EVB-${sixDigits(n)}`;
export const versionedAccessionOf = (accession: string, version: number): string => `${accession}.${version}`;
export const runSheetIdOf = (n: number): string => `RS-${sixDigits(n)}`;
export const submissionIdOf = (n: number): string => `S-${sixDigits(n)}`;
export const campaignIdOf = (n: number): string => `C-${sixDigits(n)}`;

export const accessionPattern = /^EVB-\d{6,9}$/;
export const runSheetPattern = /^RS-\d{6,9}$/;
export const submissionPattern = /^S-\d{6,9}$/;

/** "EVB-000042.1" taken apart; null for anything else. */
export const readVersionedAccession = (text: string): { accession: string; version: number } | null => {
  const [, accession, version] = /^(EVB-\d{6,9})\.([1-9]\d{0,5})$/.exec(text.trim()) ?? [];
  return accession && version ? { accession, version: Number(version) } : null;
};

/** The number inside a public name: numberOf('RS-000123') is 123. */
export const numberOf = (name: string): number => Number(name.slice(name.indexOf('-') + 1));
