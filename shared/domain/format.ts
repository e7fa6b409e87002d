/**
 * How numbers are written. Digits are limited by the standard error (two significant digits of it), a minus is a
 * true minus, thousands are parted by a narrow no-break space, and a rounding never makes the two ends of an interval equal.
 */

export const minus = '\u2212';
export const narrowSpace = '\u202f';

/** How a figure is written: as it is, in per cent, or in thousandths. */
export type Scale = 'plain' | 'percent' | 'thousandths';
const factors: Readonly<Record<Scale, { shift: number; suffix: string }>> = {
  plain: { shift: 0, suffix: '' },
  percent: { shift: 2, suffix: `${narrowSpace}%` },
  thousandths: { shift: 3, suffix: '' },
};

const mostDecimals = 15;

/** Decimal places that show two significant digits of a standard error: 0.0028 → 4, 0.0996 → 2 (it rounds to 0.10), 31 → 0. */
export const decimalsFor = (standardError: number): number => {
  if (!(standardError > 0) || !Number.isFinite(standardError)) return 4;
  const exponent = Number(standardError.toExponential(1).split('e')[1]);
  return Math.min(mostDecimals, Math.max(0, 1 - exponent));
};

const group = (digits: string): string => digits.replace(/\B(?=(\d{3})+(?!\d))/g, narrowSpace);

/** x with so many decimals, true minus and grouped thousands; a value that rounds to zero has no sign. */
export const formatNumber = (x: number, decimals: number): string => {
  if (!Number.isFinite(x)) return Number.isNaN(x) ? 'not a number' : x > 0 ? 'infinite' : `${minus}infinite`;
  const text = Math.abs(x).toFixed(Math.min(mostDecimals, Math.max(0, decimals)));
  const [whole = '0', fraction] = text.split('.');
  const sign = x < 0 && Number(text) !== 0 ? minus : '';
  return `${sign}${group(whole)}${fraction === undefined ? '' : `.${fraction}`}`;
};

/** A whole number: 230 000. */
export const formatCount = (n: number): string => formatNumber(n, 0);

/** Moves the decimal point by text, so that 0.57 in per cent is 57 and not 56.99999999999999. */
const shifted = (x: number, shift: number): number => (shift === 0 ? x : Number(`${x}e${shift}`.replace(/e([+-]?\d+)e(\d+)$/, (_, a: string, b: string) => `e${Number(a) + Number(b)}`)));

/** x on a scale; `decimals` are those of the plain number. */
export const formatValue = (x: number, decimals: number, scale: Scale = 'plain'): string => {
  const { shift, suffix } = factors[scale];
  return formatNumber(shifted(x, shift), decimals - shift) + suffix;
};

/** "0.9658 to 0.9732". */
export const formatRange = (low: number, high: number, decimals: number, scale: Scale = 'plain'): string => `${formatValue(low, decimals, scale)} to ${formatValue(high, decimals, scale)}`;

/** With a sign: "+0.03", "−0.03", "0.00". For differences and residuals. */
export const formatSigned = (x: number, decimals: number): string => {
  const text = formatNumber(x, decimals);
  return x > 0 && /[1-9]/.test(text) ? `+${text}` : text;
};

/** 0.95 → "95 %". */
export const formatLevel = (level: number): string => `${formatNumber(Number((level * 100).toFixed(6)), Number.isInteger(Number((level * 100).toFixed(6))) ? 0 : 1)}${narrowSpace}%`;

/** 41200 → "41 kB"; powers of 1000, as file managers count. */
export const formatBytes = (bytes: number): string => {
  const units = ['bytes', 'kB', 'MB', 'GB'];
  let size = bytes;
  let unit = 0;
  while (size >= 999.5 && unit < units.length - 1) {
    size /= 1000;
    unit += 1;
  }
  return `${formatNumber(size, unit > 0 && size < 9.95 ? 1 : 0)} ${units[unit] ?? ''}`;
};

/** "a, b and c". */
export const joinWords = (words: readonly string[], last = 'and'): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} ${last} ${words[words.length - 1] ?? ''}`;

const numberWords = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve', 'thirteen', 'fourteen', 'fifteen', 'sixteen', 'seventeen', 'eighteen', 'nineteen', 'twenty'];
/** Small counts in words, others in digits: "three", "17". */
export const countInWords = (n: number): string => numberWords[n] ?? formatCount(n);
export const capitalise = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
export const plural = (n: number, one: string, many = `${one}s`): string => (n === 1 ? one : many);
