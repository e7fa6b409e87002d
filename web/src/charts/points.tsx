import { useContext, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { Readout } from './readout.ts';

export interface PlotPoint {
  key: string;
  /** "Depth 16: 0.9695, 95 % interval 0.9658 to 0.9732" */
  label: string;
  draw: ReactNode;
}

const steps: Readonly<Record<string, (at: number, last: number) => number>> = {
  ArrowRight: (at, last) => Math.min(last, at + 1),
  ArrowDown: (at, last) => Math.min(last, at + 1),
  ArrowLeft: (at) => Math.max(0, at - 1),
  ArrowUp: (at) => Math.max(0, at - 1),
  Home: () => 0,
  End: (_, last) => last,
};

/** Points of a plot: one tab stop for all, arrow keys go from point to point, each reads out its numbers. */
export function Points({ label, points }: { label: string; points: readonly PlotPoint[] }) {
  const read = useContext(Readout);
  const [active, setActive] = useState(0);
  const group = useRef<SVGGElement>(null);
  const move = (event: KeyboardEvent<SVGGElement>): void => {
    const next = steps[event.key]?.(Math.min(active, points.length - 1), points.length - 1);
    if (next === undefined) return;
    event.preventDefault();
    setActive(next);
    group.current?.querySelectorAll<SVGGElement>('[data-point]')[next]?.focus();
  };
  const stop = Math.min(active, points.length - 1);
  return (
    <g ref={group} {...{ role: 'group', 'aria-label': label }} onKeyDown={move}>
      {points.map((point, i) => (
        <g key={point.key} data-point="" {...{ role: 'img', tabIndex: i === stop ? 0 : -1 }} aria-label={point.label}
          onFocus={() => { setActive(i); read(point.label); }} onBlur={() => read(null)}
          onPointerEnter={() => read(point.label)} onPointerLeave={() => read(null)}>
          {point.draw}
        </g>
      ))}
    </g>
  );
}
