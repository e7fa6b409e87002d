const width = 84;
/** More places than this are drawn as a plain line: ticks would run together. */
const mostTicks = 28;

/** One tick for each place and a firm bar over the places held; the words beside it say the same. */
export function RankStrip({ low, high, places }: { low: number; high: number; places: number }) {
  const step = width / places;
  const gap = Math.min(0.6, step / 8);
  return (
    <svg className="strip" viewBox={`0 0 ${width} 10`} aria-hidden="true" focusable="false">
      {places > mostTicks
        ? <line className="all" x1="0" x2={width} y1="5" y2="5" />
        : Array.from({ length: places }, (_, i) => <line key={i} className="all" x1={(i + 0.5) * step} x2={(i + 0.5) * step} y1="3" y2="7" />)}
      <line className="has" x1={(low - 1) * step + gap} x2={high * step - gap} y1="5" y2="5" />
    </svg>
  );
}
