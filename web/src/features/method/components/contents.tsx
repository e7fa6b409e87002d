import { outline } from '../outline.ts';

/** All sections of the page by number. */
export function Contents() {
  return (
    <nav className="toc" aria-label="Contents of this page">
      <ol>{outline.map(({ id, title }) => <li key={id}><a href={`#${id}`}>{title}</a></li>)}</ol>
    </nav>
  );
}
