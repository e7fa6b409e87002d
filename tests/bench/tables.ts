export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

export const seconds = (value: number): string => `${value.toFixed(value < 0.1 ? 4 : value < 10 ? 2 : 1)} s`;
export const ratio = (value: number): string => value.toFixed(2);

/** A table as DEVELOPERS.md takes it. */
export function markdown(head: readonly string[], rows: readonly (readonly string[])[]): string {
  const line = (cells: readonly string[]): string => `| ${cells.join(' | ')} |`;
  return [line(head), line(head.map(() => '---')), ...rows.map(line)].join('\n');
}
