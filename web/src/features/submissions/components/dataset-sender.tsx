import { formatBytes, formatLevel } from '#shared/domain/format.ts';
import { Button } from '#web/components/button.tsx';
import { DatasetFacts } from '#web/components/dataset-facts.tsx';
import { FaultTable } from '#web/components/fault-table.tsx';
import { FileDrop } from '#web/components/file-drop.tsx';
import { Message } from '#web/components/message.tsx';
import { Progress } from '#web/components/progress.tsx';
import type { DatasetSummary } from '#web/lib/dataset-summary.ts';
import { useFileReading } from '#web/lib/use-file-reading.ts';
import { useUpload, type Package, type Target } from '../use-upload.ts';
import { UploadFault } from './upload-fault.tsx';

/** Takes a file, reads it in this browser, shows what it holds or what is wrong with it, and sends it when told to. */
export function DatasetSender({ target, action }: { target: Target; action: string }) {
  const { state, choose, clear } = useFileReading();
  const sound = state.stage === 'read' && state.reading.ok ? { pack: { file: state.file, gzip: state.reading.gzip, bytesSha256: state.reading.bytesSha256 }, summary: state.reading.summary } : null;
  const upload = useUpload(target);
  const chooseNew = (file: File): void => {
    upload.send.reset();
    choose(file);
  };
  return (
    <div className="flow">
      {upload.send.isPending ? null : (
        <FileDrop lead="Drop a dataset here" accept=".json,.gz,application/json,application/gzip" onFile={chooseNew} after="It is checked in this browser; nothing is sent until you say so.">
          JSON or JSON.gz, at most 64 MiB unpacked,
        </FileDrop>
      )}
      <div role="status">
        {state.stage === 'reading' ? <p className="says">Reading {state.file.name}, {formatBytes(state.file.size)}.</p> : null}
        {sound && !upload.send.isPending ? <p className="says"><b>{sound.pack.file.name}</b> follows the format. Nothing has been sent yet.</p> : null}
      </div>
      {state.stage === 'read' && !state.reading.ok ? (
        <>
          <Message kind="fault" live>Nothing was sent. Mend what the table names and choose the file again.</Message>
          <FaultTable name={state.file.name} faults={state.reading.errors} />
        </>
      ) : null}
      {sound ? <Ready {...sound} upload={upload} action={action} onClear={() => { upload.send.reset(); clear(); }} /> : null}
    </div>
  );
}

interface ReadyProps {
  pack: Package;
  summary: DatasetSummary;
  upload: ReturnType<typeof useUpload>;
  action: string;
  onClear: () => void;
}

function Ready({ pack, summary, upload: { send, share, stop }, action, onClear }: ReadyProps) {
  const percent = formatLevel(Math.round(share * 100) / 100);
  return (
    <>
      <DatasetFacts summary={summary} />
      {send.isPending ? (
        <>
          <Progress value={share} label="Upload" />
          <p className="acts">
            <span className="tbl">{share < 1 ? `Sending ${pack.file.name}, ${percent} of ${formatBytes(pack.file.size)}.` : 'Sent. The registry is reading it.'}</span>
            {share < 1 ? <Button kind="plain" onClick={stop}>Stop</Button> : null}
          </p>
        </>
      ) : (
        <>
          {send.isError ? <UploadFault error={send.error} name={pack.file.name} /> : null}
          <p className="acts">
            <Button kind="first" onClick={() => send.mutate(pack)}>{send.isError ? 'Try again' : action}</Button>
            <Button kind="plain" onClick={onClear}>Take another file</Button>
          </p>
        </>
      )}
    </>
  );
}
