import type { ReactNode } from 'react';

export interface Fact {
  term: string;
  value: ReactNode;
}

/** Label over value, side by side, no boxes. */
export function Facts({ items }: { items: readonly Fact[] }) {
  return (
    <dl className="facts">
      {items.map(({ term, value }) => <div key={term}><dt>{term}</dt><dd>{value}</dd></div>)}
    </dl>
  );
}

/** Label beside value, one a line, for records. */
export function Ledger({ items }: { items: readonly Fact[] }) {
  return (
    <dl className="ledger">
      {items.map(({ term, value }) => <div key={term}><dt>{term}</dt><dd>{value}</dd></div>)}
    </dl>
  );
}
