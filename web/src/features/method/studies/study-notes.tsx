import { formatCount } from '#shared/domain/format.ts';

/** How a study was made, and the command that makes it again. */
export function StudyNotes({ study, trials, unit }: { study: { method: string; date: string; command: string; seedRule: string; notes: readonly string[] }; trials: number; unit: string }) {
  return (
    <details className="earlier">
      <summary>How the study was made</summary>
      <ul className="plainlist">
        <li>Method {study.method}, {study.date}, {formatCount(trials)} {unit}.</li>
        {study.notes.map((note) => <li key={note}>{note}</li>)}
        <li>Seeds: {study.seedRule}.</li>
        <li>Made again by <code>{study.command}</code>.</li>
      </ul>
    </details>
  );
}
