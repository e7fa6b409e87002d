import { useMemo, type ReactNode } from 'react';
import type { Entry } from '#shared/contracts/entries.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { Progress } from '#web/components/progress.tsx';
import { requestOf } from '../recompute/messages.ts';
import { progressAnnouncement, progressWords, verdictOf } from '../recompute/recompute-words.ts';
import { useRecompute, type RecomputeState } from '../recompute/use-recompute.ts';
import { RecomputedFigures, RecomputedRecord } from './recompute-table.tsx';

/** What a screen reader hears: the stages, and the end. */
const announcementOf = (state: RecomputeState): string => {
  if (state.phase === 'running') return progressAnnouncement(state.progress);
  if (state.phase === 'idle') return state.cancelled ? 'Cancelled. Nothing was kept.' : '';
  return state.phase === 'done' ? verdictOf(state.outcome).sentence : `${state.fault.title}. ${state.fault.detail}`;
};

const actionOf = (state: RecomputeState): string => {
  if (state.phase === 'done') return 'Recompute again';
  return state.phase === 'fault' ? 'Try again' : 'Recompute here';
};

/** The button, the run while it lasts, and what came of it: beside the commands, the tables below both. */
export function RecomputeRun({ entry, intro, commands }: { entry: Entry; intro: ReactNode; commands: ReactNode }) {
  const request = useMemo(() => requestOf(entry), [entry]);
  const { state, start, cancel } = useRecompute(request);
  const running = state.phase === 'running';
  const verdict = state.phase === 'done' ? verdictOf(state.outcome) : null;
  return (
    <div className="flow recompute">
      <div className="cols2">
        <div className="flow">
          {intro}
          <p className="acts noprint">
            <Button onClick={start} busy={running} disabled={state.phase === 'fault' && !state.fault.again}>{actionOf(state)}</Button>
            {running ? <Button kind="plain" onClick={cancel}>Cancel</Button> : null}
          </p>
          <p role="status" className="unseen">{announcementOf(state)}</p>
          {running ? (
            <div className="flow">
              <p className="small" aria-hidden="true">{progressWords(state.progress)}</p>
              <Progress value={state.progress.fraction} label="Recomputing in this browser" />
            </div>
          ) : null}
          {state.phase === 'idle' && state.cancelled ? <p className="small" aria-hidden="true">Cancelled. Nothing was kept.</p> : null}
          {state.phase === 'fault' ? <Message kind="fault"><p><strong>{state.fault.title}.</strong> {state.fault.detail}</p></Message> : null}
          {verdict ? <Message kind={verdict.kind} label={verdict.label}>{verdict.sentence}</Message> : null}
        </div>
        <div className="flow">{commands}</div>
      </div>
      {state.phase === 'done' ? (
        <>
          {state.outcome.comparison ? <RecomputedFigures entry={entry} comparison={state.outcome.comparison} /> : null}
          <RecomputedRecord checks={state.outcome.checks} comparison={state.outcome.comparison} />
        </>
      ) : null}
    </div>
  );
}
