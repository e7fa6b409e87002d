import { useId } from 'react';
import type { Option } from './select.tsx';

/** A short row of choices: words with a line under the chosen one. */
export function Choice<T extends string>({ legend, value, options, onChange, inline = false }: { legend: string; value: T; options: readonly Option<T>[]; onChange: (value: T) => void; inline?: boolean }) {
  const name = useId();
  return (
    <fieldset className={inline ? 'choiceset inline' : 'choiceset'}>
      <legend>{legend}</legend>
      <div className="choice">
        {options.map((option) => (
          <label key={option.value}>
            <input type="radio" name={name} value={option.value} checked={option.value === value} onChange={() => onChange(option.value)} />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
