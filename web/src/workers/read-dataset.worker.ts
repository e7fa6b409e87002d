import { readDatasetFile } from '#web/lib/read-dataset-file.ts';

/** Reads one dataset file off the page's thread; a file of 64 MiB takes a while. One file, one answer. */
declare const self: DedicatedWorkerGlobalScope;

self.onmessage = (event: MessageEvent<Blob>) => {
  void readDatasetFile(event.data).then(
    (reading) => self.postMessage(reading),
    (error: unknown) => self.postMessage({ ok: false, errors: [{ pointer: '', message: `The file could not be read: ${error instanceof Error ? error.message : String(error)}` }] }),
  );
};
