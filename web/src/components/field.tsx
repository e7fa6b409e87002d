import { useId, type ReactNode } from 'react';

export interface FieldFrame {
  label: ReactNode;
  /** A quiet line under the field. */
  hint?: ReactNode;
  /** What is wrong and the value that was given; replaces the hint. */
  error?: string | null | undefined;
}

/** What a control inside a field needs to be tied to its label, hint and error. */
export interface FieldWiring {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
}

/** Label, control, hint or error. The control is drawn by `children` with the wiring it is given. */
export function Field({ label, hint, error, id, children }: FieldFrame & { id?: string | undefined; children: (wiring: FieldWiring) => ReactNode }) {
  const own = useId();
  const control = id ?? own;
  const note = `${control}-note`;
  const described = error || hint ? note : undefined;
  return (
    <div className={error ? 'field bad' : 'field'}>
      <label htmlFor={control}>{label}</label>
      {children({ id: control, 'aria-describedby': described, 'aria-invalid': error ? true : undefined })}
      {error ? <p className="err" id={note}>{error}</p> : hint ? <p className="hint" id={note}>{hint}</p> : null}
    </div>
  );
}
