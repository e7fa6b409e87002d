/** The numbers of a chart as a table: what is read, and behind it the exact value for the CSV file. */
export interface ChartCell {
  text: string;
  raw: number | string | null;
}

export interface ChartTable {
  caption: string;
  columns: readonly { head: string; csv: string; numeric?: boolean }[];
  rows: readonly (readonly ChartCell[])[];
}

export const cell = (text: string, raw: number | string | null = text): ChartCell => ({ text, raw });

/** A text cell that a spreadsheet would take for a formula is defused with an apostrophe. */
const csvField = (raw: ChartCell['raw']): string => {
  if (raw === null) return '';
  if (typeof raw === 'number') return String(raw);
  const text = /^[=+\-@\t\r]/.test(raw) ? `'${raw}` : raw;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
};

/** RFC 4180 text with a head line; numbers at full precision. */
export const toCsv = (table: ChartTable): string =>
  [table.columns.map((c) => csvField(c.csv)), ...table.rows.map((row) => row.map((c) => csvField(c.raw)))].map((line) => `${line.join(',')}\r\n`).join('');
