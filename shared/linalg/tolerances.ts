/**
 * Every tolerance of the linear algebra, each relative to the largest singular value unless said otherwise.
 * They are part of method M1: changing one makes another method.
 */

/** A singular value above this share of the largest counts towards the rank. Rounding sits near 1e-15, real directions above 1e-3. */
export const RANK_CUT = 1e-9;

/** The rank is called ambiguous when any cut between these two gives another one. */
export const AMBIGUOUS_FROM = 1e-12;
export const AMBIGUOUS_TO = 1e-4;

/** Gauge columns whose remaining length falls below this share of the longest are dependent. They are O(1) or rounding. */
export const GAUGE_CUT = 1e-9;

/** The gauge directions must be invisible to the design to this share, or the fast path is refused: rounding gives 1e-14. */
export const GAUGE_RESIDUE = 1e-12;

/** Below this ratio of smallest to largest singular value the squared matrix has lost too much: 1e-4 squared leaves eight digits. */
export const FAST_PATH_FLOOR = 1e-4;

/** A vector is determined when its share inside the null space is at most this. */
export const DETERMINED_CUT = 1e-6;

/** Smallest ratio of a design sound enough for ranking, and the ratio below which a patch determines nothing. */
export const SOUND_RATIO = 0.01;
export const TOO_WEAK_RATIO = 1e-3;

/** The Lanczos iteration stops when its extreme value moves by less than this share over several steps. */
export const LANCZOS_CHANGE = 1e-14;
