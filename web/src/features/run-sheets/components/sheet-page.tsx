import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { RunSheetView } from '#shared/contracts/run-sheets.ts';
import { BlankState } from '#web/components/blank-state.tsx';
import { ButtonLink } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Progress } from '#web/components/progress.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { isDrawing, runSheetQuery } from '../api/run-sheets.ts';
import { HowToRun, SealWords } from './how-to-run.tsx';
import { DrawnLedger, SheetFacts } from './sheet-facts.tsx';

/** One run sheet: its drawing, then how to run it and what it commits to. */
export function SheetPage({ id }: { id: string }) {
  const sheet = useQuery(runSheetQuery(id));
  const above = <><Link to="/desk/run-sheets">Run sheets</Link>, {id}</>;
  if (!sheet.data) {
    return (
      <Wrap>
        <PageHead slim above={above} title={id} />
        <Read level={2} query={sheet} what="This run sheet" loading={`Loading ${id}`} rows={5}
          missing={<BlankState level={2} title="There is no such run sheet"><p>No run sheet has the number {id}, or it belongs to another organisation.</p></BlankState>}>
          {() => null}
        </Read>
      </Wrap>
    );
  }
  return (
    <Wrap>
      <PageHead slim above={above} title={`Run sheet ${id}`}><SheetFacts sheet={sheet.data} /></PageHead>
      <SheetBody sheet={sheet.data} />
    </Wrap>
  );
}

function SheetBody({ sheet }: { sheet: RunSheetView }) {
  if (isDrawing(sheet)) {
    return (
      <Section title="Drawing" aside="You may leave this page.">
        <p className="opening mid" role="status">{sheet.state === 'waiting' ? 'Waiting for its turn.' : sheet.message ?? 'Drawing circuits until the design is sound.'}</p>
        <Progress value={sheet.progress} label="Drawing of the run sheet" />
      </Section>
    );
  }
  if (sheet.state === 'failed') {
    return (
      <Section title="Not drawn">
        <Message kind="fault">{sheet.message ?? 'No sound sheet was found.'}</Message>
        <p className="acts after"><ButtonLink to="/desk/run-sheets/new">Plan another with more circuits</ButtonLink></p>
      </Section>
    );
  }
  return (
    <>
      <Section title="The sheet" aside="Number and seal are fixed.">
        <div className="flow">
          <DrawnLedger sheet={sheet} />
          <p className="acts">
            {sheet.file ? <a className={sheet.submission ? 'btn' : 'btn main-act'} href={sheet.file} download={`${sheet.id}.json`}>Download the sheet, JSON</a> : null}
            {sheet.submission ? <ButtonLink to={`/desk/submissions/${sheet.submission}`}>Open its submission {sheet.submission}</ButtonLink> : <ButtonLink to="/desk/submissions/new">Submit its counts</ButtonLink>}
          </p>
        </div>
      </Section>
      <Section title="How to run it" aside="And what to send back."><HowToRun sheet={sheet} /></Section>
      <Section title="The seal"><SealWords sheet={sheet} /></Section>
    </>
  );
}
