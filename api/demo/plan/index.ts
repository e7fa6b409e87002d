import { otherClasses } from './other-classes.ts';
import { quarterTurns } from './quarter-turns.ts';
import type { Story } from './story.ts';
import { unfinished } from './unfinished.ts';

/** Everything that happens in the demo registry, by the day on which each sheet was asked for. */
export const stories: readonly Story[] = [...quarterTurns, ...otherClasses, ...unfinished].sort((a, b) => (a.day === b.day ? (a.key < b.key ? -1 : 1) : a.day < b.day ? -1 : 1));
