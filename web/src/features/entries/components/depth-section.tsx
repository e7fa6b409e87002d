import { useId, useMemo } from 'react';
import type { Entry } from '#shared/contracts/entries.ts';
import { figureDecimals } from '#shared/domain/figure-words.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { formatCount, formatNumber, joinWords, plural } from '#shared/domain/format.ts';
import { ChartFrame } from '#web/charts/chart-frame.tsx';
import { Points } from '#web/charts/points.tsx';
import { Stretched, XYPlot } from '#web/charts/xy-plot.tsx';
import { EmptyState } from '#web/components/blank-state.tsx';
import { Section } from '#web/components/section.tsx';
import { depthDrawing, type DepthDrawing } from '../depth-data.ts';
import { fileTitle } from '../entry-words.ts';

const bandClass: Readonly<Record<number, string>> = { 0.95: 'b95', 0.8: 'b80', 0.5: 'b50' };

function DepthPlot({ drawing }: { drawing: DepthDrawing }) {
  const id = useId();
  const { points, bands, line, farFrom, x, y } = drawing;
  const headline = points.find((p) => p.headline);
  // The estimated part is drawn whole, the extrapolated part dashed; each is cut at the place where the other begins.
  const cut = farFrom ?? 100;
  const [first, second] = points;
  const named = first && second ? { x: (first.x + second.x) / 2, y: Math.max(first.y, second.y) } : null;
  return (
    <XYPlot x={x} y={y} xTitle="Circuit depth (gates)" yTitle="Retained signal" height="high" label={`Retained signal against circuit depth, ${points.length} depths${bands.length > 0 ? ', with 50, 80 and 95 per cent bands' : ''}`}>
      <Stretched>
        <clipPath id={`${id}-near`}><rect x="-5" y="-50" width={cut + 5} height="200" /></clipPath>
        <clipPath id={`${id}-far`}><rect x={cut} y="-50" width={110 - cut} height="200" /></clipPath>
        {bands.map((band) => <path key={band.level} className={bandClass[band.level]} d={band.path} />)}
        {bands.flatMap((band) => band.edges.map((edge, i) => <path key={`${band.level}-${i}`} className="edgeline" d={edge} />))}
        <path className="line" d={line} clipPath={`url(#${id}-near)`} />
        {farFrom === null ? null : <path className="line far" d={line} clipPath={`url(#${id}-far)`} />}
      </Stretched>
      <g aria-hidden="true">
        {farFrom === null ? null : <><line className="farline" x1={`${farFrom}%`} x2={`${farFrom}%`} y1="0" y2="100%" /><text x={`${farFrom}%`} y="0" dx="-7" dy="12" textAnchor="end" className="farword">extrapolated from here</text></>}
        {bands.length > 0 && named ? <><line className="dimn" x1={`${named.x}%`} x2={`${named.x}%`} y1="54%" y2={`${named.y + 1}%`} /><text x={`${named.x}%`} dx="-4" y="58%">bands: 50, 80, 95 %</text></> : null}
      </g>
      <Points label="Depths" points={points.map((p) => ({ key: String(p.depth), label: p.label, draw: <circle className="hollow dot" cx={`${p.x}%`} cy={`${p.y}%`} r={p.headline ? 6 : 4.5} /> }))} />
      {headline ? <text aria-hidden="true" className="lab named" x={`${headline.x}%`} y={`${headline.y}%`} dx="-12" dy="20" textAnchor="end">{headline.text} at depth {headline.depth}</text> : null}
    </XYPlot>
  );
}

/** What is drawn, what is missing and why, and what may not be concluded. */
const depthSays = (entry: Entry, drawing: DepthDrawing): string => {
  const missing = entry.figures.filter((f) => f.key === 'retained-signal' && f.depth !== null && f.value === null);
  const bands = drawing.bands.length > 0 ? `the bands hold 50, 80 and 95 % of ${formatCount(entry.replicates)} bootstrap replicates` : 'no bands are drawn, because not every depth has intervals';
  const gap = missing.length > 0 ? ` Not determined at ${plural(missing.length, 'depth')} ${joinWords(missing.map((f) => String(f.depth)))}${missing[0]?.reason ? `: ${missing[0].reason.replace(/\.$/, '')}` : ''}.` : '';
  return `The points are the estimates at each bench depth, joined for the eye; ${bands}. Depths are spaced by doubling.${gap} Nothing here covers drift after ${formatDate(entry.provenance.endedAt)}, other qubits, or gates outside this gate class.`;
};

/** Retained signal against depth, with bands and the extrapolated part. */
export function DepthSection({ entry }: { entry: Entry }) {
  const drawing = useMemo(() => depthDrawing(entry.figures, entry.longestCircuit), [entry.figures, entry.longestCircuit]);
  const { headline } = entry;
  const notes = (
    <>
      {drawing?.farFrom === null ? null : <p><strong>Where the line is dashed.</strong> The longest circuit in the estimate has {entry.longestCircuit} gates. Beyond twice that, the method extrapolates.</p>}
      {headline && headline.value !== null && headline.firstOrder !== null ? <p><strong>Single pass.</strong> The first of the eight passes alone gave {formatNumber(headline.firstOrder, figureDecimals(headline))} at depth {headline.depth}.</p> : null}
    </>
  );
  return (
    <Section title="Retained signal" aside="1 is an ideal device; 0 is nothing left." notes={drawing ? notes : undefined}>
      {drawing ? (
        <ChartFrame title="Retained signal over the bench circuits, by depth" table={drawing.table} fileName={`evenbeam-${entry.accession}.${entry.version}-retained-signal`}
          fileTitle={fileTitle(entry, 'retained signal by depth')} says={depthSays(entry, drawing)}>
          <DepthPlot drawing={drawing} />
        </ChartFrame>
      ) : (
        <EmptyState title="Not determined by this gate set">{entry.figures.find((f) => f.key === 'retained-signal')?.reason ?? 'The gate class has no bench circuits, so retained signal has no meaning here.'}</EmptyState>
      )}
    </Section>
  );
}
