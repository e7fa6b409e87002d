import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';

type Shape = Pick<GateClassSummary, 'kind' | 'registerSize'> & { gates: readonly { targets: readonly number[] }[] };

/** Circuits of a sheet: to estimate from, and sealed on top of them. */
export interface SheetSize {
  open: number;
  sealed: number;
}

const quarter = (n: number): number => Math.ceil(n / 4);
const leastLocal = 200;
const wholeRegister = 40;

/**
 * Size of a sheet asked for with `circuits` circuits. Joint: those and a quarter sealed. Chained: so many for each pair,
 * a third (at least 200) for each qubit, a quarter sealed in every patch, and 40 sealed circuits over the whole register;
 * in a register of two the pair is the whole register, and its own sealed circuits serve.
 */
export const sheetSize = ({ kind, registerSize, gates }: Shape, circuits: number): SheetSize => {
  if (kind === 'joint') return { open: circuits, sealed: quarter(circuits) };
  const pairs = new Set(gates.filter((g) => g.targets.length === 2).map((g) => [...g.targets].sort((a, b) => a - b).join())).size;
  const local = Math.max(leastLocal, Math.ceil(circuits / 3));
  return { open: pairs * circuits + registerSize * local, sealed: pairs * quarter(circuits) + registerSize * quarter(local) + (registerSize > 2 ? wholeRegister : 0) };
};

/** Shots of the whole sheet, the sealed circuits included: they must be run too. */
export const totalShots = (shape: Shape, circuits: number, shots: number): number => {
  const { open, sealed } = sheetSize(shape, circuits);
  return (open + sealed) * shots;
};
