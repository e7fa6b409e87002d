import type { Opinions, TimedOpinion } from '#shared/contracts/opinions.ts';
import { decimalsFor, formatNumber, formatSigned, narrowSpace } from '#shared/domain/format.ts';

type Route = TimedOpinion['method'];
export type OpinionFigure = TimedOpinion['figures'][number];

const names: Readonly<Record<Route, string>> = {
  'single-pass': 'Single pass',
  'ideal-spam': 'Process tomography, SPAM taken as ideal',
  likelihood: 'Maximum likelihood',
  'likelihood-positive': 'Maximum likelihood, completely positive',
  structured: 'Structured analysis',
};

/** For the heads of narrow columns. */
const short: Readonly<Record<Route, string>> = { 'single-pass': 'Single pass', 'ideal-spam': 'SPAM as ideal', likelihood: 'Likelihood', 'likelihood-positive': 'Likelihood, positive', structured: 'Structured' };

export const shortName = (route: Route): string => short[route];

export const routeName = (route: Route): string => names[route];

/** What each route does otherwise, and what that does to its figures. */
const what: Readonly<Record<Route, string>> = {
  'single-pass': 'The first-order estimate, which the official one goes on from. Its bias grows as the square of the noise.',
  'ideal-spam': 'Preparation and readout are held at their ideals, so what they do wrong is laid to the gates: losses come out too large. That is its bias, not a fault of the data.',
  likelihood: 'Of all trace-preserving maps those that make the counts likeliest, climbed to from the official estimate.',
  'likelihood-positive': 'The same, with every gate brought to a completely positive map.',
  structured: 'States and effects of the sequences are unknowns of their own; the repeated blocks make small errors of the gates add up.',
};

export const whatItDoes = (route: Route): string => what[route];

/** "0.41 s", "38 s". */
export const secondsWords = (seconds: number): string => `${formatNumber(seconds, seconds < 1 ? 2 : seconds < 10 ? 1 : 0)}${narrowSpace}s`;

/** "Converged in 4 iterations, 2.0 above the official estimate in log-likelihood" */
export const convergenceWords = ({ converged, iterations, gain }: NonNullable<TimedOpinion['convergence']>): string =>
  `${converged ? 'Converged' : 'Did not converge'} in ${iterations} ${iterations === 1 ? 'iteration' : 'iterations'}; log-likelihood ${formatSigned(gain, 1)} against the official estimate.`;

/** Two digits of the official standard error, as the official figure itself. */
export const figureDigits = ({ officialError }: OpinionFigure): number => (officialError === null ? 4 : decimalsFor(officialError));

/** "+1.2 standard errors" from the official figure. */
export const distanceWords = ({ distance }: OpinionFigure): string | null => (distance === null ? null : `${formatSigned(distance, 1)} s.e.`);

export const stillComing = (state: Opinions['state'] | undefined): boolean => state === 'waiting' || state === 'computing';

/** Asked again every few seconds while they are being made. */
export const opinionPolling = (state: Opinions['state'] | undefined): number | false => (stillComing(state) ? 4000 : false);
