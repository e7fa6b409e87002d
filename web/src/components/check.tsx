import { useId, type InputHTMLAttributes, type ReactNode, type Ref } from 'react';

type CheckProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'className' | 'type'> & { label: ReactNode; hint?: ReactNode; error?: string | null | undefined; ref?: Ref<HTMLInputElement> };

function Tick({ kind, label, hint, error, ...rest }: CheckProps & { kind: 'checkbox' | 'radio' }) {
  const id = useId();
  const note = `${id}-note`;
  return (
    <div className={error ? 'field bad' : 'field'}>
      <label className="check">
        <input {...rest} type={kind} aria-describedby={error || hint ? note : undefined} aria-invalid={error ? true : undefined} />
        <span>{label}</span>
      </label>
      {error ? <p className="err" id={note}>{error}</p> : hint ? <p className="hint indent" id={note}>{hint}</p> : null}
    </div>
  );
}

/** A yes or no. */
export function Checkbox(props: CheckProps) {
  return <Tick kind="checkbox" {...props} />;
}

/** One of several; give all of a group the same `name` and put them in a `Group`. */
export function Radio(props: CheckProps) {
  return <Tick kind="radio" {...props} />;
}

/** Names a group of radios or checkboxes. */
export function Group({ legend, error, children }: { legend: string; error?: string | null; children: ReactNode }) {
  const id = useId();
  return (
    <fieldset aria-describedby={error ? id : undefined} className="field">
      <legend>{legend}</legend>
      {children}
      {error ? <p className="err" id={id}>{error}</p> : null}
    </fieldset>
  );
}
