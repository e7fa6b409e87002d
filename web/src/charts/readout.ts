import { createContext } from 'react';

/** Tells the chart's frame which point is under the pointer or the keyboard, in words; null when none is. */
export const Readout = createContext<(words: string | null) => void>(() => undefined);
