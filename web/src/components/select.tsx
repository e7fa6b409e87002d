import type { Ref, SelectHTMLAttributes } from 'react';
import { Field, type FieldFrame } from './field.tsx';

export interface Option<T extends string = string> {
  value: T;
  label: string;
}

type SelectProps = FieldFrame & Omit<SelectHTMLAttributes<HTMLSelectElement>, 'className' | 'children'> & { options: readonly Option[]; ref?: Ref<HTMLSelectElement> };

/** One of a list. The browser's own list, so that it works with every keyboard and screen reader. */
export function Select({ label, hint, error, id, options, ...rest }: SelectProps) {
  return (
    <Field label={label} hint={hint} error={error} id={id}>
      {(wiring) => (
        <span className="pick">
          <select {...rest} {...wiring}>{options.map((o) => <option key={o.value} value={o.value}>{o.label}</option>)}</select>
        </span>
      )}
    </Field>
  );
}
