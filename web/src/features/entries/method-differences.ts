import type { VersionResult } from '#shared/contracts/methods.ts';
import { columnDecimals, figureRange, figureValue } from '#shared/domain/figure-words.ts';
import { formatNumber, formatSigned } from '#shared/domain/format.ts';

export interface MethodLine {
  method: string;
  standing: string;
  value: string;
  interval: string;
  /** From the frozen figure; null for the frozen one itself, and where one of both is not determined. */
  difference: string | null;
  settled: string;
  links: VersionResult['links'];
}

/** How far apart in standard errors of the frozen figure, in words; both come from the same counts. */
const inErrors = (difference: number, standardError: number | null): string => {
  if (standardError === null || standardError === 0) return '';
  const share = Math.abs(difference) / standardError;
  return share < 0.01 ? ', below 0.01 standard errors' : `, ${formatNumber(share, share < 10 ? 2 : 0)} standard errors`;
};

/** One line a method version: the headline with its interval, and how far it lies from the frozen one. */
export const methodLines = (results: readonly VersionResult[]): MethodLine[] => {
  const frozen = results.find((r) => r.frozen)?.headline ?? null;
  const headlines = results.flatMap(({ headline }) => (headline ? [headline] : []));
  // One digit more than usual: what is of interest here is the difference.
  const decimals = columnDecimals(headlines) + 1;
  return results.map(({ method, status, headline, settled, frozen: own, links }) => {
    const [here, there] = [headline?.value ?? null, frozen?.value ?? null];
    const difference = !own && here !== null && there !== null ? here - there : null;
    return {
      method,
      standing: own ? 'Frozen with this version' : status === 'draft' ? 'Draft, added later' : 'Added later',
      value: headline ? figureValue(headline, decimals) : 'Not determined',
      interval: (headline && figureRange(headline, 0.95, decimals)) ?? 'none',
      difference: difference === null ? null : formatSigned(difference, decimals) + inErrors(difference, frozen?.standardError ?? null),
      settled: settled ? 'Yes' : 'No',
      links,
    };
  });
};
