import { Link } from 'react-router-dom';
import type { Submission } from '#shared/contracts/submissions.ts';
import { formatBytes, formatCount } from '#shared/domain/format.ts';
import { Facts, type Fact } from '#web/components/facts.tsx';

export function SubmissionFacts({ submission: s }: { submission: Submission }) {
  const qubits = `${s.register.length === 1 ? 'qubit' : 'qubits'} ${s.register.join(', ')}`;
  const items: Fact[] = [
    { term: 'Device', value: s.device ? <><span className="nowrap">{s.device.name}</span>, {qubits}</> : qubits },
    { term: 'Gate class', value: s.gateClass?.title ?? 'none of the registry' },
    { term: 'Run sheet', value: s.runSheet ? <Link to={`/desk/run-sheets/${s.runSheet}`}>{s.runSheet}</Link> : 'none; never ranked' },
    { term: 'File', value: <><a href={s.file.href} download={s.file.name}>{s.file.name}</a>, {formatBytes(s.file.bytes)}, {formatCount(s.file.circuits)} circuits</> },
  ];
  return <Facts items={items} />;
}
