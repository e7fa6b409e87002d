import type { ErrorDetail } from '#shared/errors/app-error.ts';
import type { ErrorCode } from '#shared/errors/codes.ts';
import type { DatasetSummary } from './dataset-summary.ts';

/** What a thread finds out about a file: that it follows the format, and what it says; or its faults. */
export type Inspection = { ok: true; contentId: string; bytesSha256: string; summary: DatasetSummary } | { ok: false; code: ErrorCode; message: string; details: ErrorDetail[] };
export type Inspected = Extract<Inspection, { ok: true }>;
