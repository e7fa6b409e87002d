/** Five categorical marks, each with a shape of its own so that colour is never the only cue. */
export type MarkNumber = 1 | 2 | 3 | 4 | 5;

export const markNames: Readonly<Record<MarkNumber, string>> = { 1: 'circle', 2: 'diamond', 3: 'square', 4: 'triangle', 5: 'cross' };

const n = (x: number): string => String(Math.round(x * 100) / 100);

/** A mark centred on 0,0. `size` is half its height. */
export function MarkShape({ mark, size }: { mark: MarkNumber; size: number }) {
  const s = size;
  switch (mark) {
    case 1: return <circle className="dot" r={n(s * 0.7)} />;
    case 2: return <path className="dot" d={`M0 ${n(-s)}L${n(s)} 0L0 ${n(s)}L${n(-s)} 0Z`} />;
    case 3: return <rect className="dot squaredot" x={n(-s * 0.8)} y={n(-s * 0.8)} width={n(s * 1.6)} height={n(s * 1.6)} />;
    case 4: return <path className="dot" d={`M0 ${n(-s)}L${n(s)} ${n(s * 0.8)}H${n(-s)}Z`} />;
    case 5: return <path className="crossdot" d={`M${n(-s * 0.8)} ${n(-s * 0.8)}L${n(s * 0.8)} ${n(s * 0.8)}M${n(s * 0.8)} ${n(-s * 0.8)}L${n(-s * 0.8)} ${n(s * 0.8)}`} />;
  }
}
