import express, { type Request, type Response } from 'express';
import { AppError } from '#shared/errors/app-error.ts';

/** Records, messages and decisions are small; files go through routes with a raw body. */
const limitBytes = 256 * 1024;
const parser = express.json({ limit: limitBytes, strict: true, inflate: false });

/** The request's JSON body, read only once the caller is known. */
export const readJson = async (request: Request, response: Response): Promise<unknown> => {
  if (!request.is('application/json')) throw new AppError('unsupported-media-type', `Content-Type is ${JSON.stringify(request.get('content-type') ?? '')}; this address takes application/json.`);
  await new Promise<void>((resolve, reject) => parser(request, response, (fault?: unknown) => (fault ? reject(fault) : resolve())));
  return request.body;
};

interface ParserFault {
  type: string;
  message: string;
}

const isParserFault = (fault: unknown): fault is ParserFault => fault instanceof Error && 'type' in fault && typeof fault.type === 'string';

/** The body parser's own faults in the registry's words; null for any other fault. */
export const explainParserFault = (fault: unknown): AppError | null => {
  if (!isParserFault(fault)) return null;
  if (fault.type === 'entity.parse.failed') return new AppError('malformed-json', `The body is not readable JSON: ${fault.message}.`);
  if (fault.type === 'entity.too.large') return new AppError('too-large', `The body is larger than ${limitBytes / 1024} KiB.`);
  if (fault.type === 'encoding.unsupported' || fault.type === 'charset.unsupported') return new AppError('unsupported-media-type', `${fault.message}.`);
  if (fault.type === 'request.aborted' || fault.type === 'request.size.invalid') return new AppError('invalid-request', 'The body broke off before its announced length.');
  return null;
};
