import type { Entry } from '#shared/contracts/entries.ts';
import { figureDecimals, intervalAt } from '#shared/domain/figure-words.ts';
import { formatNumber, narrowSpace } from '#shared/domain/format.ts';
import { linearAxis } from '#web/charts/axis.ts';
import { beamExtent } from '#web/charts/beam-geometry.ts';

const steps = [
  { level: 0.5, height: 22, y: 138, half: 64, words: `50${narrowSpace}% of replicates` },
  { level: 0.8, height: 11, y: 172, half: 26, words: `80${narrowSpace}%` },
  { level: 0.95, height: 4, y: 206, half: 26, words: `95${narrowSpace}%` },
] as const;
const beamY = 92;

/** How a figure is drawn, taught on a real one: the headline of an entry. */
export function Lesson({ entry }: { entry: Pick<Entry, 'headline' | 'device' | 'accession' | 'version'> }) {
  const figure = entry.headline;
  if (!figure || figure.value === null || !figure.intervals) return null;
  const axis = linearAxis(beamExtent([figure]), { pad: 0.06 });
  const middle = axis.at(figure.value);
  const drawn = steps.flatMap((step) => {
    const interval = intervalAt(figure, step.level);
    return interval ? [{ ...step, from: axis.at(interval.low), to: axis.at(interval.high) }] : [];
  });
  return (
    <>
      <svg role="img" aria-label="How a figure is drawn: a dot for the estimate, and three steps that hold 50, 80 and 95 percent of the uncertainty" width="100%" height="236">
        <g className="beam">
          {[...drawn].reverse().map((s) => <rect key={s.level} x={`${s.from}%`} width={`${s.to - s.from}%`} y={beamY - s.height / 2} height={s.height} />)}
          <circle className="dot bigdot" cx={`${middle}%`} cy={beamY} r="7.5" />
        </g>
        <line className="dimn" x1={`${middle}%`} x2={`${middle}%`} y1="40" y2="76" />
        <text className="t" x={`${middle}%`} y="16" textAnchor="middle">the estimate, {formatNumber(figure.value, figureDecimals(figure))}</text>
        <text x={`${middle}%`} y="33" textAnchor="middle">retained signal at depth {figure.depth}, {entry.device.name}</text>
        {drawn.map((s) => (
          <g key={s.level}>
            <line className="dimn" x1={`${s.from}%`} x2={`${s.to}%`} y1={s.y} y2={s.y} />
            <line className="dimn" x1={`${s.from}%`} x2={`${s.from}%`} y1="108" y2={s.y + 4} />
            <line className="dimn" x1={`${s.to}%`} x2={`${s.to}%`} y1="108" y2={s.y + 4} />
            <svg x={`${(s.from + s.to) / 2}%`} y={s.y} className="ov"><rect x={-s.half} y="-9" width={2 * s.half} height="18" className="blank" /><text className="lab" textAnchor="middle" y="4">{s.words}</text></svg>
          </g>
        ))}
      </svg>
    </>
  );
}
