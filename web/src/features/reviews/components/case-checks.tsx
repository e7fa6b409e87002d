import type { Check } from '#shared/contracts/common.ts';
import { useState } from 'react';
import { capitalise, countInWords, plural } from '#shared/domain/format.ts';
import { CheckList } from '#web/components/check-list.tsx';

/** Notes and faults first; what passed is one line until it is asked for. */
export function CaseChecks({ checks }: { checks: readonly Check[] }) {
  const [all, setAll] = useState(false);
  const passed = checks.filter((c) => c.status === 'passed').length;
  const shown = all ? checks : checks.filter((c) => c.status !== 'passed');
  return (
    <>
      {shown.length > 0 ? <CheckList checks={shown} /> : null}
      {passed > 0 ? (
        <p className="says checkrest">
          {capitalise(countInWords(passed))} {shown.length > 0 && !all ? 'other ' : ''}{plural(passed, 'check')} passed.{' '}
          <button type="button" className="linkish" aria-expanded={all} onClick={() => setAll(!all)}>{all ? 'Show only what to look at' : 'Show all'}</button>
        </p>
      ) : null}
    </>
  );
}
