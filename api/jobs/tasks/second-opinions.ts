import type { TimedOpinion } from '#shared/contracts/opinions.ts';
import type { Figure, Seal } from '#shared/formats/types.ts';
import { SecondOpinions } from '#shared/opinions/opine.ts';
import type { OpinionMethod } from '#shared/opinions/types.ts';
import type { ThreadProgress } from '#api/jobs/threads.ts';
import { readStored } from './read-stored.ts';

export interface SecondOpinionsInput {
  bytes: Uint8Array;
  seal: Seal | null;
  /** Figures of the official estimate. */
  official: Figure[];
  methods: readonly OpinionMethod[];
}

export interface SecondOpinionsOutput {
  opinions: TimedOpinion[];
  officialSeconds: number;
}

/** What a route starts from: the official estimate, and for the completely positive maximum also the free one. */
const startsFrom: Readonly<Record<OpinionMethod, 'itself' | 'official' | 'likelihood'>> = {
  'single-pass': 'official', 'ideal-spam': 'itself', likelihood: 'official', 'likelihood-positive': 'likelihood', structured: 'itself',
};

/** Some routes of a dataset, each with its running time, that of what it starts from included. */
export const secondOpinions = ({ bytes, seal, official, methods }: SecondOpinionsInput, report: (progress: ThreadProgress) => void): SecondOpinionsOutput => {
  const { dataset, gateClass } = readStored(bytes);
  const timed = <T>(act: () => T): [T, number] => {
    const start = performance.now();
    return [act(), (performance.now() - start) / 1000];
  };
  const [desk, officialSeconds] = timed(() => new SecondOpinions({ dataset, gateClass, seal, official }));
  const spent = new Map<OpinionMethod, number>();
  const opinions = methods.map((method, i): TimedOpinion => {
    report({ stage: method, fraction: (i + 1) / (methods.length + 1) });
    const [opinion, own] = timed(() => desk.opine(method));
    const before = { itself: 0, official: officialSeconds, likelihood: spent.get('likelihood') ?? 0 }[startsFrom[method]];
    spent.set(method, before + own);
    return { ...opinion, seconds: opinion.reason === null ? before + own : null };
  });
  return { opinions, officialSeconds };
};
