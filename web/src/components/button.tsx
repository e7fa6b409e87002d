import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { Link } from 'react-router-dom';

/** `first`: the one first action of a screen. `own`: acts on the reader's own selection. `force`: cannot be taken back. */
export type ButtonKind = 'plain' | 'usual' | 'first' | 'own' | 'force';
const classes: Readonly<Record<ButtonKind, string>> = { usual: 'btn', first: 'btn main-act', plain: 'btn plain', own: 'btn own', force: 'btn force' };

type ButtonProps = Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'className'> & { kind?: ButtonKind; busy?: boolean };

/** While `busy` the button keeps its place and its focus, but does nothing. */
export function Button({ kind = 'usual', busy = false, type = 'button', onClick, children, ...rest }: ButtonProps) {
  return (
    <button {...rest} type={type} className={classes[kind]} aria-busy={busy || undefined} aria-disabled={busy || undefined}
      onClick={(event) => { if (busy) event.preventDefault(); else onClick?.(event); }}>
      {children}
    </button>
  );
}

/** A link that looks like a button: for going somewhere, not for doing something. */
export function ButtonLink({ to, kind = 'usual', children }: { to: string; kind?: ButtonKind; children: ReactNode }) {
  return <Link className={classes[kind]} to={to}>{children}</Link>;
}
