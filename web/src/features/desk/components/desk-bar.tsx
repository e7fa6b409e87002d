import { useId, type ReactNode } from 'react';
import { NavLink } from 'react-router-dom';
import type { Organisation } from '../organisation.ts';

export interface DeskItem {
  to: string;
  label: string;
  /** Marked only at this very address. */
  end?: boolean;
}

export const contributorItems: readonly DeskItem[] = [
  { to: '/desk/run-sheets', label: 'Run sheets' },
  { to: '/desk/submissions', label: 'Submissions' },
  { to: '/desk/devices', label: 'Devices' },
  { to: '/desk/tokens', label: 'Tokens' },
];

/** The second bar: where one is in one's own work, and for whom. */
export function DeskBar({ items, children }: { items: readonly DeskItem[]; children: ReactNode }) {
  return (
    <nav className="deskbar" aria-label="Your work">
      <div className="wrap">
        <ul>{items.map((item) => <li key={item.to}><NavLink to={item.to} {...(item.end ? { end: true } : {})}>{item.label}</NavLink></li>)}</ul>
        {children}
      </div>
    </nav>
  );
}

/** The organisation worked for; a choice where there are several. */
export function OrganisationChoice({ own, chosen, onChoose }: { own: readonly Organisation[]; chosen: Organisation; onChoose: (id: string) => void }) {
  const id = useId();
  if (own.length < 2) return <span className="org">{chosen.name}</span>;
  return (
    <span className="org orgpick">
      <label htmlFor={id}>For</label>
      <span className="pick">
        <select id={id} value={chosen.id} onChange={(event) => onChoose(event.target.value)}>
          {own.map((o) => <option key={o.id} value={o.id}>{o.name}</option>)}
        </select>
      </span>
    </span>
  );
}
