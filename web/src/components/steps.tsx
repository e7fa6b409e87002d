import type { ReactNode } from 'react';

/** Numbered steps with a rule between them. `wide` gives the number a column of its own. */
export function Steps({ items, wide = false }: { items: readonly ReactNode[]; wide?: boolean }) {
  return (
    <ol className={wide ? 'steps wide' : 'steps'}>
      {items.map((item, i) => <li key={i}><div>{item}</div></li>)}
    </ol>
  );
}
