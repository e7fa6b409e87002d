export interface RankRow {
  gates: string;
  columns: number;
  gauge: number;
  rank: number;
  /** Greatest less than columns − gauge: the set does not determine all. */
  complete: boolean;
  /** Smallest over greatest singular value, as found on drawn designs. */
  ratio: string;
}

/** Gate sets with the rank they can reach. Columns and gauge follow from the gates alone; ratios depend on the circuits drawn. */
export const rankRows: readonly RankRow[] = [
  { gates: 'identity, rx(π/2), ry(π/2)', columns: 43, gauge: 12, rank: 31, complete: true, ratio: '0.09 to 0.17' },
  { gates: 'rx(π/2), ry(π/2)', columns: 31, gauge: 12, rank: 19, complete: true, ratio: '0.20' },
  { gates: 'identity, h, t', columns: 43, gauge: 12, rank: 31, complete: true, ratio: '0.010 to 0.045' },
  { gates: 'identity, h, t, with circuits of length 8 only', columns: 43, gauge: 12, rank: 30, complete: false, ratio: '0.01' },
  { gates: 'x, y, z', columns: 43, gauge: 10, rank: 7, complete: false, ratio: '0.18' },
  { gates: 'rx(π/2) alone', columns: 19, gauge: 11, rank: 5, complete: false, ratio: 'not measured' },
  { gates: 'rx(π/2), ry(π/2) on each of two qubits, cz', columns: 1263, gauge: 240, rank: 1023, complete: true, ratio: '0.025 to 0.029' },
  { gates: 'rx(π/2), ry(π/2) on each of two qubits, cx', columns: 1263, gauge: 240, rank: 1023, complete: true, ratio: '0.025 to 0.029' },
];
