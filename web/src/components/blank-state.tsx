import type { ReactNode } from 'react';

/** Words in place of content: what would be here, and how to get it. Base of empty, fault and closed-door states. */
export function BlankState({ title, children, act, live = false }: { title: string; children?: ReactNode; act?: ReactNode; live?: boolean }) {
  return (
    <div className="blank-state" role={live ? 'alert' : undefined}>
      <h3>{title}</h3>
      {typeof children === 'string' ? <p>{children}</p> : children}
      {act ? <p className="acts">{act}</p> : null}
    </div>
  );
}

/** Nothing here yet, or nothing that matches. */
export function EmptyState(props: { title: string; children?: ReactNode; act?: ReactNode }) {
  return <BlankState {...props} />;
}

/** Not open to this reader: says why, and what would open it. */
export function ClosedDoor({ title, children, act }: { title: string; children: ReactNode; act?: ReactNode }) {
  return <BlankState title={title} act={act}>{children}</BlankState>;
}
