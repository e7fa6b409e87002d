import type { ReactNode } from 'react';

/** 3 inside a section, 2 directly on a page. */
export type HeadingLevel = 2 | 3;

/** Words in place of content: what would be here, and how to get it. Base of empty, fault and closed-door states. */
export function BlankState({ title, children, act, live = false, level = 3 }: { title: string; children?: ReactNode; act?: ReactNode; live?: boolean; level?: HeadingLevel }) {
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <div className="blank-state" role={live ? 'alert' : undefined}>
      <Heading>{title}</Heading>
      {typeof children === 'string' ? <p>{children}</p> : children}
      {act ? <p className="acts">{act}</p> : null}
    </div>
  );
}

/** Nothing here yet, or nothing that matches. */
export function EmptyState(props: { title: string; children?: ReactNode; act?: ReactNode; level?: HeadingLevel }) {
  return <BlankState {...props} />;
}

/** Not open to this reader: says why, and what would open it. */
export function ClosedDoor({ title, children, act, level = 3 }: { title: string; children: ReactNode; act?: ReactNode; level?: HeadingLevel }) {
  return <BlankState title={title} act={act} level={level}>{children}</BlankState>;
}
