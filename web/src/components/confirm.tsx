import { useEffect, useRef, useState, type ReactNode } from 'react';
import { Button } from './button.tsx';
import { VisuallyHidden } from './visually-hidden.tsx';

interface ConfirmProps {
  /** Words of the button that asks: "Cancel this submission". */
  ask: string;
  /** What it is about, where the button's words do not say it by themselves; read out only. */
  about?: string;
  /** What would happen, said before it does. */
  children: ReactNode;
  /** Words of the button that does it: "Yes, cancel it". */
  act: string;
  /** Words of the button that does not: "Keep it". */
  keep?: string;
  busy?: boolean;
  onConfirm: () => void;
}

/** Asks once more, in place, before something that cannot be taken back. The focus goes to the question and back. */
export function Confirm({ ask, about, children, act, keep = 'Keep it', busy = false, onConfirm }: ConfirmProps) {
  const [asked, setAsked] = useState(false);
  const box = useRef<HTMLDivElement>(null);
  const opener = useRef<HTMLSpanElement>(null);
  const wasAsked = useRef(false);
  useEffect(() => {
    if (asked) box.current?.focus();
    else if (wasAsked.current) opener.current?.querySelector('button')?.focus();
    wasAsked.current = asked;
  }, [asked]);
  if (!asked) return <span ref={opener}><Button onClick={() => setAsked(true)}>{ask}{about ? <>{' '}<VisuallyHidden>{about}</VisuallyHidden></> : null}</Button></span>;
  return (
    // Escape leaves the question; the buttons inside do the rest.
    // eslint-disable-next-line jsx-a11y/no-noninteractive-element-interactions
    <div className="confirm" role="group" aria-label={about ? `${ask} ${about}` : ask} tabIndex={-1} ref={box} onKeyDown={(event) => { if (event.key === 'Escape') setAsked(false); }}>
      <div>{typeof children === 'string' ? <p>{children}</p> : children}</div>
      <p className="acts">
        <Button kind="force" busy={busy} onClick={onConfirm}>{act}</Button>
        <Button onClick={() => setAsked(false)}>{keep}</Button>
      </p>
    </div>
  );
}
