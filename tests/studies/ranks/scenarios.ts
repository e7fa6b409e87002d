/** Boards of one kind: how far apart the devices truly are, and how much each was measured. */
export interface Scenario {
  id: string;
  title: string;
  /** True retained signal less `BASE`, in standard errors of a device measured with `REFERENCE_SHOTS`. */
  offsets: readonly number[];
  shots: readonly number[];
}

/** True retained signal of a device with offset 0, and the shots whose standard error is the unit of the offsets. */
export const BASE = 0.9;
export const REFERENCE_SHOTS = 1000;

const ten = (of: (i: number) => number): number[] => Array.from({ length: 10 }, (_, i) => of(i));
const UNEQUAL = [300, 500, 500, 1000, 1000, 2000, 2000, 5000, 10_000, 20_000];

export const scenarios: readonly Scenario[] = [
  { id: 'equal', title: 'Ten equal devices', offsets: ten(() => 0), shots: ten(() => 1000) },
  { id: 'equal-unequal-shots', title: 'Ten equal devices, 300 to 20,000 shots', offsets: ten(() => 0), shots: UNEQUAL },
  { id: 'even', title: 'Evenly spaced, one standard error apart', offsets: ten((i) => 0 - i), shots: ten(() => 1000) },
  { id: 'clusters', title: 'Three clusters of equal devices, six standard errors apart', offsets: ten((i) => (i < 3 ? 0 : i < 7 ? -6 : -12)), shots: ten(() => 1000) },
  { id: 'outlier', title: 'Nine equal devices and one ten standard errors better', offsets: ten((i) => (i === 0 ? 10 : 0)), shots: ten(() => 1000) },
  { id: 'even-unequal-shots', title: 'Pairs of equal devices, two standard errors apart, 300 to 20,000 shots', offsets: ten((i) => 0 - 2 * Math.floor(i / 2)), shots: ten((i) => UNEQUAL[(i * 7) % 10]!) },
];
