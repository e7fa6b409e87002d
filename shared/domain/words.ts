/** Numbers in sentences: narrow space between thousands, true minus. */
const narrow = '\u202f';
const minus = '\u2212';

/** 230000 -> "230 000" */
export const count = (n: number): string => String(n).replace(/\B(?=(\d{3})+(?!\d))/g, narrow);

/** Fixed decimals with a true minus; `sign` also prints a plus. */
export const decimals = (x: number, digits: number, sign = false): string => {
  const text = Math.abs(x).toFixed(digits);
  const negative = x < 0 && Number(text) !== 0;
  return negative ? `${minus}${text}` : sign ? `+${text}` : text;
};

/** 41234 -> "41 kB" */
export const bytesInWords = (bytes: number): string => {
  if (bytes < 1000) return `${bytes} bytes`;
  if (bytes < 999_500) return `${Math.round(bytes / 1000)} kB`;
  return `${(bytes / 1e6).toFixed(1)} MB`;
};
