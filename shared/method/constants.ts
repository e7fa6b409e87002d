/** The method's name in results, seeds and the log. */
export const METHOD = 'M1';

/** Passes in all: the first-order estimate and seven more. Eight leave less than the shot noise up to 1 % gate error. */
export const PASSES = 8;

/** Passes stop when a parameter leaves this range: no error map of a working gate is that large. */
export const LARGEST_PARAMETER = 1;

/** Settled = the last pass moved the predicted probabilities by less than this share of the shot noise. */
export const SETTLED_SHARE = 0.1;

export const DEFAULT_REPLICATES = 2000;

/** Draws of the misfit's own bootstrap: a pair's residual costs a hundred times that of one qubit. */
export const MISFIT_DRAWS = { one: 2000, pair: 200 } as const;

/** |z| of a standard normal that leaves 1 % outside: the 99 % range of the misfit. */
export const MISFIT_RANGE = 2.58;

/** More than this share of replicates dropped leaves the figures not determined. */
export const MOST_DROPPED = 0.01;

/** A depth beyond this many times the longest estimated circuit is an extrapolation. */
export const EXTRAPOLATION = 2;

/** Depths at which figures of bench circuits are given. */
export const BENCH_DEPTHS = [0, 1, 4, 8, 16, 32, 64] as const;

/** Whole circuits over more qubits than this are not predicted; from the second number on they are read from fewer replicates. */
export const LARGEST_REGISTER = 8;
export const LARGE_REGISTER = 5;
export const LARGE_REPLICATES = 200;
