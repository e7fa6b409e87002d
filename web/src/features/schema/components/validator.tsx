import { formatBytes } from '#shared/domain/format.ts';
import { DatasetFacts } from '#web/components/dataset-facts.tsx';
import { FaultTable } from '#web/components/fault-table.tsx';
import { FileDrop } from '#web/components/file-drop.tsx';
import { Message } from '#web/components/message.tsx';
import { useFileReading } from '#web/lib/use-file-reading.ts';

/** Checks a file with the registry's own code, in this browser. Nothing leaves it. */
export function Validator() {
  const { state, choose } = useFileReading();
  return (
    <div className="flow">
      <FileDrop lead="Drop a dataset here" accept=".json,.gz,application/json,application/gzip" onFile={choose} after="It is checked in this browser and goes nowhere.">
        JSON or JSON.gz, at most 64 MiB unpacked,
      </FileDrop>
      <div role="status">
        {state.stage === 'reading' ? <p className="says">Reading {state.file.name}, {formatBytes(state.file.size)}.</p> : null}
        {state.stage === 'read' && state.reading.ok ? <Message kind="done"><p><b>{state.file.name}</b> follows the format. Content id <span className="hash">{state.reading.contentId}</span></p></Message> : null}
      </div>
      {state.stage === 'read' && state.reading.ok ? <DatasetFacts summary={state.reading.summary} /> : null}
      {state.stage === 'read' && !state.reading.ok ? <><Message kind="fault" live>The file does not follow the format. Each fault is named with its place.</Message><FaultTable name={state.file.name} faults={state.reading.errors} /></> : null}
    </div>
  );
}
