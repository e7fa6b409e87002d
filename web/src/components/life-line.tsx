import type { ReactNode } from 'react';
import { VisuallyHidden } from './visually-hidden.tsx';

export interface LifeStage {
  name: string;
  /** "2026-05-04, 09:31" or what happens there: "a curator reads it". */
  note?: ReactNode;
  when: 'past' | 'now' | 'ahead';
}
const words: Readonly<Record<LifeStage['when'], string>> = { past: 'done', now: 'now', ahead: 'to come' };

/** Life of a submission: a line that is firm as far as it has come. */
export function LifeLine({ label, stages }: { label: string; stages: readonly LifeStage[] }) {
  return (
    <ol className="track" aria-label={label}>
      {stages.map(({ name, note, when }) => (
        <li key={name} className={when === 'ahead' ? undefined : when} aria-current={when === 'now' ? 'step' : undefined}>
          <b>{name}</b><VisuallyHidden>{` (${words[when]})`}</VisuallyHidden>
          {note ? <span>{note}</span> : null}
        </li>
      ))}
    </ol>
  );
}
