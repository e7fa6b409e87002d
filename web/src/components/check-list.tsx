import type { Check } from '#shared/contracts/common.ts';

const words: Readonly<Record<Check['status'], string>> = { passed: 'Passed', note: 'Note', failed: 'Failed', running: 'Running', waiting: 'Waiting' };
const classes: Readonly<Record<Check['status'], string>> = { passed: 'passed', note: 'note', failed: 'failed', running: 'now', waiting: 'wait' };

/** The checks of a submission in the order they are made; the weight of the word tells the state. */
export function CheckList({ checks }: { checks: readonly Check[] }) {
  return (
    <ul className="checks">
      {checks.map((check) => (
        <li key={check.id} className={classes[check.status]}>
          <span className="w">{words[check.status]}</span>
          <span>{check.title}</span>
          <span className="quiet">{check.detail}</span>
        </li>
      ))}
    </ul>
  );
}
