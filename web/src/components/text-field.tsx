import type { InputHTMLAttributes, Ref, TextareaHTMLAttributes } from 'react';
import { Field, type FieldFrame } from './field.tsx';

type InputProps = FieldFrame & Omit<InputHTMLAttributes<HTMLInputElement>, 'className'> & { ref?: Ref<HTMLInputElement> };

/** One line of text. Spread react-hook-form's `register(…)` into it, or give `value` and `onChange`. */
export function TextField({ label, hint, error, id, type = 'text', ...rest }: InputProps) {
  return (
    <Field label={label} hint={hint} error={error} id={id}>
      {(wiring) => <input {...rest} {...wiring} type={type} />}
    </Field>
  );
}

type AreaProps = FieldFrame & Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'className'> & { ref?: Ref<HTMLTextAreaElement> };

/** Several lines of text. */
export function TextArea({ label, hint, error, id, rows = 4, ...rest }: AreaProps) {
  return (
    <Field label={label} hint={hint} error={error} id={id}>
      {(wiring) => <textarea {...rest} {...wiring} rows={rows} />}
    </Field>
  );
}
