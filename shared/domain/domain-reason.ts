import type { EligibilityFacts, Reason } from './eligibility.ts';
import type { FigureDomain } from './figure-domain.ts';
import { figureName } from './figure-words.ts';

/** Loss of the worst gate as far as it is known: the greatest lower and the greatest upper 95 % bound of any gate. */
function worstGate(facts: EligibilityFacts): { low: number; high: number } {
  const bounds = facts.figures.filter((f) => f.key === 'gate-loss').map((f) => f.intervals?.find((i) => i.level === 0.95) ?? { low: Number.NEGATIVE_INFINITY, high: Number.POSITIVE_INFINITY });
  return { low: Math.max(0, ...bounds.map((b) => b.low)), high: Math.max(0, ...bounds.map((b) => b.high)) };
}

const shown = (loss: number): string => (Number.isFinite(loss) ? loss.toPrecision(2) : 'anything');

const reason = (sentence: string, remedy: string): Reason => ({ code: 'domain', sentence, remedy });

/** Why the entry lies outside the domain of the board's figure, or null. Judged by the worst gate's loss, the fewest shots of a circuit, and depth. */
export function domainReason(facts: EligibilityFacts, domains: readonly FigureDomain[] | null): Reason | null {
  if (!domains || !facts.gateClass) return null;
  const name = figureName({ ...facts.figure, gate: null });
  const known = domains.filter((d) => d.gateClass === facts.gateClass?.id && d.key === facts.figure.key && d.depth === facts.figure.depth);
  const shots = Math.min(...facts.patches.map((p) => p.shots));
  const here = known.filter((d) => shots >= d.shots.from && (d.shots.below === null || shots < d.shots.below));
  if (here.length === 0) {
    const later = known.filter((d) => d.shots.from > shots).map((d) => d.shots.from);
    return reason(
      `${name}: its intervals were not shown to hold in this gate class ${known.length === 0 ? 'at any gate loss' : `at ${shots} shots`}.`,
      later.length > 0 ? `A dataset of at least ${Math.min(...later)} shots a circuit, or another figure.` : 'Read the board by another figure.',
    );
  }
  const { low, high } = worstGate(facts);
  if (here.some((d) => high <= d.gateLoss.to && low >= d.gateLoss.from)) return null;
  const { from, to } = here[0]!.gateLoss;
  if (high > to) return reason(`${name}: its intervals were shown to hold up to a gate loss of ${shown(to)}; this entry’s may be as high as ${shown(high)}.`, 'A quieter device, or more shots, so that the loss is known more closely.');
  return reason(`${name}: its intervals were shown to hold from a gate loss of ${shown(from)} on; this entry’s may be as low as ${shown(low)}.`, 'Read the board by another figure: of so quiet a device this one is not known well enough.');
}
