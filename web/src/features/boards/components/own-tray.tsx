import { useOwnSelection } from '#web/lib/own-selection.ts';

/** What the reader has marked as their own, at the foot of the window. */
export function OwnTray() {
  const own = useOwnSelection();
  if (own.list.length === 0) return null;
  return (
    <div className="tray noprint" role="region" aria-label="Your selection">
      <div className="wrap">
        <p><b>Yours:</b> {own.list.map((entry, i) => <span key={entry.accession}>{i > 0 ? ', ' : ''}<span className="nowrap">{entry.name}</span></span>)}</p>
        <button type="button" className="btn plain" onClick={own.clear}>Clear</button>
      </div>
    </div>
  );
}
