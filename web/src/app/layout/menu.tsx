import { useEffect, useRef } from 'react';
import { NavLink, useLocation } from 'react-router-dom';
import type { Me } from '#shared/contracts/session.ts';
import type { NavItem } from './nav-items.ts';
import { Who } from './who.tsx';

/** The folding menu of narrow screens. Closes on a change of page, on Escape, and on a click outside. */
export function Menu({ items, person }: { items: readonly NavItem[]; person: Me | null }) {
  const box = useRef<HTMLDetailsElement>(null);
  const { pathname, search } = useLocation();
  useEffect(() => { if (box.current) box.current.open = false; }, [pathname, search]);
  useEffect(() => {
    const closeOutside = (event: PointerEvent) => {
      if (box.current && event.target instanceof Node && !box.current.contains(event.target)) box.current.open = false;
    };
    const closeOnEscape = (event: KeyboardEvent) => {
      if (event.key !== 'Escape' || !box.current?.open) return;
      box.current.open = false;
      box.current.querySelector('summary')?.focus();
    };
    document.addEventListener('pointerdown', closeOutside);
    document.addEventListener('keydown', closeOnEscape);
    return () => {
      document.removeEventListener('pointerdown', closeOutside);
      document.removeEventListener('keydown', closeOnEscape);
    };
  }, []);
  return (
    <details className="menu" ref={box}>
      <summary>Menu</summary>
      <nav aria-label="Main, short">
        <ul>
          {items.map((item) => <li key={item.to}><NavLink to={item.to}>{item.label}</NavLink></li>)}
          <li className="who-in"><Who person={person} /></li>
        </ul>
      </nav>
    </details>
  );
}
