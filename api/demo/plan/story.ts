/** One dataset's way through the registry, as the demo lives it: what was measured, when, and what became of it. */
export interface Story {
  /** Short and unique: seeds the sheet and the counts. */
  key: string;
  /** Name of the device. */
  device: string;
  gateClass: string;
  /** Day on which the run sheet is asked for; a weekend waits for Monday. */
  day: string;
  circuits: number;
  shots: number;
  title: string;
  /** `acquisition.notes` of the file. */
  runNotes?: string;
  /** Notes of the record beside the file. */
  notes?: string;
  /** Something wrong with the first run. */
  flaw?: Flaw;
  /** Circuits of the contributor's own, without a run sheet. */
  ownDesign?: true;
  /** Key of the story whose entry this one corrects. */
  corrects?: string;
  embargoUntil?: string;
  /** Which exchange between curator and contributor there is, by its number in exchanges.ts. */
  exchange?: number;
  end: End;
}

/** drift: the rotation angle moves during the run; readout: a wrong threshold; unknown device: the file names one that is not registered. */
export type Flaw = 'drift' | 'readout' | 'unknown-device';

export type End =
  | { kind: 'frozen' }
  /** Returned once with this reason, run again on the same sheet, then frozen. */
  | { kind: 'run-again'; reason: string }
  | { kind: 'returned'; reason: string }
  | { kind: 'declined'; reason: string }
  /** Sent to review; claimed or not. */
  | { kind: 'in-review'; claimed: boolean }
  | { kind: 'ready' }
  | { kind: 'checking' }
  | { kind: 'blocked' }
  | { kind: 'cancelled'; message: string };

type Told = Omit<Story, 'key' | 'circuits' | 'shots' | 'end'> & Partial<Pick<Story, 'circuits' | 'shots' | 'end'>>;

const usual: Readonly<Record<string, Pick<Story, 'circuits' | 'shots'>>> = {
  'quarter-turn-1q/1': { circuits: 240, shots: 1000 },
  // Its gates determine their losses least well; with fewer shots no interval would lie inside the studied range.
  'clifford-t-1q/1': { circuits: 400, shots: 4000 },
  'half-turn-1q/1': { circuits: 200, shots: 1000 },
  'quarter-turn-cz-2q/1': { circuits: 1200, shots: 1000 },
  'chained-cz-2q/1': { circuits: 600, shots: 1000 },
  'chained-cz-3q/1': { circuits: 600, shots: 1000 },
  'chained-cz-5q/1': { circuits: 600, shots: 1000 },
};

const slug = (text: string): string => text.toLowerCase().replace(/[^a-z0-9]+/g, '-');

/** A story with what goes without saying filled in: the usual size of its class, and frozen in the end. */
export const story = (told: Told): Story => {
  const size = usual[told.gateClass];
  if (!size) throw new Error(`The demo has no usual size for ${told.gateClass}.`);
  return { ...size, end: { kind: 'frozen' }, ...told, key: slug(`${told.device} ${told.gateClass} ${told.day}`) };
};
