import { useId, type ReactNode } from 'react';

/** A section hangs its heading in the margin column, under a firm rule; `notes` says what it means and what it does not. */
export function Section({ title, aside, notes, id, className, children }: { title: string; aside?: ReactNode; notes?: ReactNode; id?: string; className?: string; children: ReactNode }) {
  const heading = useId();
  return (
    <section className={notes ? 'sec noted' : 'sec'} id={id} aria-labelledby={heading}>
      <div className="side">
        <h2 id={heading}>{title}</h2>
        {aside ? <p>{aside}</p> : null}
      </div>
      <div className={className ? `main ${className}` : 'main'}>{children}</div>
      {notes ? <div className="notes">{notes}</div> : null}
    </section>
  );
}
