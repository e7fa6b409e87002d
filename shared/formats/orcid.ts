/** Check digit of an ORCID iD: ISO 7064 MOD 11-2 over the first fifteen digits; 10 is written X. */
export function orcidCheckDigit(digits: string): string {
  let total = 0;
  for (const digit of digits) total = ((total + Number(digit)) * 2) % 11;
  const remainder = (12 - total) % 11;
  return remainder === 10 ? 'X' : String(remainder);
}

/** Is the sixteenth character the one that the fifteen digits before it ask for? Takes the form 0000-0002-1825-0097. */
export function isOrcid(orcid: string): boolean {
  const digits = orcid.replaceAll('-', '');
  return /^[0-9]{15}[0-9X]$/.test(digits) && orcidCheckDigit(digits.slice(0, 15)) === digits[15];
}
