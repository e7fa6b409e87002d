import { useMemo } from 'react';
import type { Entry } from '#shared/contracts/entries.ts';
import { figureName, figureRange, figureValue } from '#shared/domain/figure-words.ts';
import { Section } from '#web/components/section.tsx';
import { angleNotes, qubitNames } from '../entry-words.ts';
import { gateFigures } from '../gate-rows.ts';
import { GateTable, hasNoAngle } from './gate-table.tsx';

/** Figures of the register that stand for themselves, in this order. */
const standing = ['error-per-gate', 'readout-loss', 'output-error'] as const;

/** Figures of single gates, and those of the register that stand for themselves. */
export function GatesSection({ entry }: { entry: Entry }) {
  const figures = useMemo(() => gateFigures(entry), [entry]);
  const single = standing.flatMap((key) => entry.figures.filter((f) => f.key === key && (f.depth === null || f.depth === 16)));
  const notes = angleNotes(entry);
  const several = entry.register.length > 1;
  return (
    <Section title="Gates and readout" aside="Figures that no choice of gauge can alter." className="flow"
      notes={<>{notes.map((note) => <p key={note.gate}><strong>{note.gate}</strong> {note.sentence}</p>)}{several && figures.rows.some((row) => hasNoAngle(row.angle)) ? <p>Angle error is not defined where the ideal gate has no complex eigenvalue: such a gate turns by no angle that could be read.</p> : null}<p>Gate loss hardly sees a small wrong angle, which is why the two are shown apart.</p></>}>
      <GateTable figures={figures} register={several} />
      <dl className="trio">
        {single.map((figure) => (
          <div key={`${figure.key}-${figure.depth}-${figure.qubits.join('-')}`}>
            <dt>{figureName(figure)}{entry.register.length > 1 && figure.qubits.length < entry.register.length ? <span className="quiet">, {qubitNames(entry, figure.qubits)}</span> : null}</dt>
            <dd>{figure.value === null ? <><span className="undetermined">Not determined by this gate set.</span><span className="sub">{figure.reason}</span></> : <><b>{figureValue(figure)}</b><span className="sub">{figureRange(figure) ?? 'no interval'}</span></>}</dd>
          </div>
        ))}
      </dl>
    </Section>
  );
}
