import type { ReactNode } from 'react';

type Kind = 'note' | 'caution' | 'fault' | 'done';
const words: Readonly<Record<Kind, string>> = { note: 'Note', caution: 'Caution', fault: 'Fault', done: 'Done' };

/** A message names its kind in a word; the weight of its rule is the second cue. `live` reads it out when it appears. */
export function Message({ kind, label, live = false, children }: { kind: Kind; label?: string; live?: boolean; children: ReactNode }) {
  const role = live ? (kind === 'fault' ? 'alert' : 'status') : undefined;
  return (
    <div className={kind === 'note' ? 'msg' : `msg ${kind}`} role={role}>
      <span className="kind">{label ?? words[kind]}</span>
      <div>{typeof children === 'string' ? <p>{children}</p> : children}</div>
    </div>
  );
}
