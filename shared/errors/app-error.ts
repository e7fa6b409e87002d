import { errorCodes, type ErrorCode } from '#shared/errors/codes.ts';

/** One fault in a file or a request: where (JSON Pointer, "" = the whole) and a plain sentence with the offending value. */
export interface ErrorDetail {
  pointer: string;
  message: string;
}

/** Problem details as RFC 9457 has them; `errors` lists the faults one by one. */
export interface ProblemDetails {
  type: string;
  title: string;
  status: number;
  detail: string;
  errors?: ErrorDetail[];
}

/** The one kind of error that the project throws on purpose. Its message may be shown to whoever asked. */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly code: ErrorCode;
  readonly details: readonly ErrorDetail[];

  constructor(code: ErrorCode, message: string, details: readonly ErrorDetail[] = [], options?: { cause?: unknown }) {
    super(message, options);
    this.code = code;
    this.details = details;
  }

  get status(): number {
    return errorCodes[this.code].status;
  }

  get title(): string {
    return errorCodes[this.code].title;
  }

  /** Address of the help page, relative to the registry. */
  get type(): string {
    return `/problems/${this.code}`;
  }

  toProblem(): ProblemDetails {
    const problem: ProblemDetails = { type: this.type, title: this.title, status: this.status, detail: this.message };
    if (this.details.length > 0) problem.errors = [...this.details];
    return problem;
  }
}
