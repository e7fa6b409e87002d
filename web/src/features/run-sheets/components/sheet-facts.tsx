import type { RunSheetView } from '#shared/contracts/run-sheets.ts';
import { Facts, Ledger, type Fact } from '#web/components/facts.tsx';
import { When } from '#web/components/when.tsx';
import { formatCount } from '#shared/domain/format.ts';
import { circuitsOf } from '../sheet-words.ts';

export function SheetFacts({ sheet }: { sheet: RunSheetView }) {
  const items: Fact[] = [
    { term: 'Device', value: <><span className="nowrap">{sheet.device.name}</span>, {sheet.register.length === 1 ? 'qubit' : 'qubits'} {sheet.register.join(', ')}</> },
    { term: 'Gate class', value: sheet.gateClass.title },
    ...(sheet.kind === 'structured' ? [{ term: 'Kind', value: 'Structured, never ranked' }] : []),
    { term: 'Shots each', value: formatCount(sheet.shots) },
    { term: 'Asked for', value: <><When at={sheet.createdAt} /> by {sheet.createdBy}</> },
  ];
  return <Facts items={items} />;
}

/** What the draw gave: numbers of circuits and the soundness of the design. */
export function DrawnLedger({ sheet }: { sheet: RunSheetView }) {
  const raised = sheet.circuits !== null && sheet.circuits > sheet.circuitsAsked;
  const number = circuitsOf(sheet);
  const items: Fact[] = [
    { term: 'Circuits', value: number ? `${formatCount(number.all)}: ${formatCount(number.open)} to estimate from${sheet.circuits !== number.open ? `, ${formatCount(sheet.circuits ?? 0)} of them for each pair` : ''}; ${formatCount(sheet.sealed ?? 0)} sealed` : '' },
    { term: 'Shots in all', value: sheet.totalShots === null ? '' : formatCount(sheet.totalShots) },
    { term: 'Rank', value: sheet.rank },
    { term: 'Condition ratio', value: sheet.conditionRatio === null ? '' : <>σ<sub>r</sub>/σ<sub>1</sub> {sheet.conditionRatio.toPrecision(2)}, floor 0.01</> },
    { term: 'Draws', value: sheet.draws },
    { term: 'Drawn', value: sheet.drawnAt ? <When at={sheet.drawnAt} exact /> : '' },
    { term: 'SHA-256 of the sheet', value: <code>{sheet.sheetSha256}</code> },
  ];
  return (
    <>
      {raised ? <p className="says">You asked for {formatCount(sheet.circuitsAsked)} circuits. No sheet of that many was sound; {formatCount(sheet.circuits ?? 0)} is the first number that was.</p> : null}
      <Ledger items={items} />
    </>
  );
}
