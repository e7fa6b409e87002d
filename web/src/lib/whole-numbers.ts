const narrowSpace = '\u202f';

/** "275 000": a narrow space between thousands, from 1 000 on. */
export const wholeNumber = (n: number): string => String(Math.round(n)).replace('-', '\u2212').replace(/\B(?=(\d{3})+(?!\d))/g, narrowSpace);

/** "41 kB", "1.2 MB": decimal units, as file managers count. */
export const bytesInWords = (bytes: number): string => {
  if (bytes < 1000) return `${bytes}${narrowSpace}B`;
  const [value, unit] = bytes < 999_500 ? [bytes / 1000, 'kB'] : [bytes / 1e6, 'MB'];
  return `${value < 10 ? value.toFixed(1) : Math.round(value)}${narrowSpace}${unit}`;
};
