import { problem } from '#shared/contracts/common.ts';
import { submissionAccepted } from '#shared/contracts/submissions.ts';
import type { z } from 'zod';
import { ApiError, contractError, fromProblem, offlineError } from '#web/lib/api-error.ts';

export interface Upload {
  method: 'POST' | 'PUT';
  address: string;
  /** The bytes as chosen: a gzip file is sent as it is, under Content-Encoding. */
  body: Blob;
  gzip: boolean;
  headers: Readonly<Record<string, string>>;
  idempotencyKey: string;
  csrfToken: string;
  /** Share of the bytes that have left, 0 to 1. */
  onProgress: (share: number) => void;
  signal?: AbortSignal;
}

type Accepted = z.infer<typeof submissionAccepted>;

/** Sends a dataset. XMLHttpRequest, because fetch does not tell how much of a body has left. */
export const uploadDataset = (upload: Upload): Promise<Accepted> =>
  new Promise<Accepted>((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open(upload.method, upload.address);
    const headers = { ...upload.headers, accept: 'application/json', 'content-type': 'application/json', 'idempotency-key': upload.idempotencyKey, 'x-csrf-token': upload.csrfToken };
    for (const [name, value] of Object.entries(headers)) request.setRequestHeader(name, value);
    if (upload.gzip) request.setRequestHeader('content-encoding', 'gzip');
    request.upload.onprogress = (event) => { if (event.lengthComputable) upload.onProgress(event.loaded / event.total); };
    request.onerror = () => reject(offlineError(null));
    request.onabort = () => reject(new DOMException('The upload was stopped.', 'AbortError'));
    request.onload = () => { try { resolve(answerOf(request)); } catch (error) { reject(error); } };
    upload.signal?.addEventListener('abort', () => request.abort(), { once: true });
    if (upload.signal?.aborted) request.abort();
    else request.send(upload.body);
  });

const bodyOf = (request: XMLHttpRequest): unknown => {
  try { return JSON.parse(request.responseText) as unknown; } catch { return null; }
};

const answerOf = (request: XMLHttpRequest): Accepted => {
  const body = bodyOf(request);
  if (request.status >= 200 && request.status < 300) {
    const accepted = submissionAccepted.safeParse(body);
    if (accepted.success) return accepted.data;
    throw contractError(request.status, 'submission', accepted.error);
  }
  const told = problem.safeParse(body);
  throw told.success ? fromProblem(told.data) : new ApiError({
    fault: 'problem', status: request.status, code: `http-${request.status}`, title: 'The registry did not take the file',
    detail: `It answered with status ${request.status} and gave no reason. Your file is still here; nothing was half-written.`,
  });
};
