import { Link, NavLink } from 'react-router-dom';
import { useMe } from '#web/lib/me.ts';
import { Mark } from './mark.tsx';
import { Menu } from './menu.tsx';
import { personalItems, publicItems } from './nav-items.ts';
import { Who } from './who.tsx';

/** Name, main navigation, the person at the screen, and the beam rule under it all. */
export function TopBar() {
  const person = useMe();
  return (
    <header className="top">
      <div className="wrap">
        <Link className="wordmark" to="/"><Mark />Evenbeam</Link>
        <nav className="wide" aria-label="Main">
          <ul>{publicItems.map((item) => <li key={item.to}><NavLink to={item.to}>{item.label}</NavLink></li>)}</ul>
        </nav>
        <div className="who">
          {personalItems(person).map((item) => <NavLink key={item.to} to={item.to}>{item.label}</NavLink>)}
          <Who person={person} />
        </div>
        <Menu items={[...publicItems, ...personalItems(person)]} person={person} />
      </div>
      <div className="beamrule" aria-hidden="true"><i /><i /></div>
    </header>
  );
}
