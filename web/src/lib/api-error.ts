import type { Problem } from '#shared/contracts/common.ts';

/** What went wrong with a request: a problem the registry named, no answer in time, no connection, or an answer of the wrong form. */
export type ApiFault = 'problem' | 'timeout' | 'offline' | 'contract';

export interface FieldFault {
  pointer: string;
  message: string;
}

/** Every failure of the api client. `title` and `message` are words for the screen. */
export class ApiError extends Error {
  override readonly name = 'ApiError';
  readonly fault: ApiFault;
  /** HTTP status; 0 where there was no answer. */
  readonly status: number;
  /** The registry's closed set of codes; for other faults the fault itself. */
  readonly code: string;
  readonly title: string;
  /** Address of the help page, where the problem names one. */
  readonly help: string | null;
  /** Reference of the request, to quote when asking. */
  readonly reference: string | null;
  readonly fields: readonly FieldFault[];

  constructor(init: { fault: ApiFault; status: number; code: string; title: string; detail: string; help?: string | null; reference?: string | null; fields?: readonly FieldFault[] }, cause?: unknown) {
    super(init.detail, cause === undefined ? undefined : { cause });
    this.fault = init.fault;
    this.status = init.status;
    this.code = init.code;
    this.title = init.title;
    this.help = init.help ?? null;
    this.reference = init.reference ?? null;
    this.fields = init.fields ?? [];
  }
}

export const fromProblem = (problem: Problem): ApiError =>
  new ApiError({ fault: 'problem', status: problem.status, code: problem.code, title: problem.title, detail: problem.detail, help: problem.type, reference: problem.instance ?? null, fields: problem.errors ?? [] });

export const timeoutError = (seconds: string): ApiError =>
  new ApiError({ fault: 'timeout', status: 0, code: 'timeout', title: 'The registry did not answer', detail: `The registry did not answer within ${seconds} seconds. Nothing of yours is lost.` });

export const offlineError = (cause: unknown): ApiError =>
  new ApiError({ fault: 'offline', status: 0, code: 'offline', title: 'The registry could not be reached', detail: 'The registry could not be reached from this browser. Nothing of yours is lost.' }, cause);

export const contractError = (status: number, where: string, cause: unknown): ApiError =>
  new ApiError({ fault: 'contract', status, code: 'contract', title: 'The answer could not be read', detail: `The registry’s answer did not have the expected form (${where}). Nothing of yours is lost.` }, cause);

/** Any thrown value as an ApiError, so that a screen has words for it. */
export const asApiError = (error: unknown): ApiError => {
  if (error instanceof ApiError) return error;
  return new ApiError({ fault: 'contract', status: 0, code: 'unexpected', title: 'This page failed', detail: error instanceof Error ? error.message : String(error) }, error);
};
