import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { createGunzip } from 'node:zlib';
import { AppError } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';

/** Bytes beyond the limit that gzip itself may add to data that does not compress. */
const overhead = 1024 * 1024;

const mebibytes = (bytes: number): string => `${Math.round(bytes / 1024 / 102.4) / 10} MiB`;

/**
 * Unpacks gzip while it arrives and stops as soon as more than `limit` bytes have come out, so that a bomb of a few
 * kilobytes never grows beyond that. Refuses damaged, cut and over-long input.
 * @throws AppError `too-large` or `malformed-gzip`
 * Cost: linear; memory is the unpacked size, at most `limit`, and once more while the parts are joined.
 */
export async function gunzipBounded(source: Uint8Array | AsyncIterable<Uint8Array>, limit: number = limits.bytes): Promise<Uint8Array> {
  const gunzip = createGunzip();
  const parts: Uint8Array[] = [];
  let taken = 0;
  let given = 0;
  // When one end of a pipeline stops, the other may be the first to complain; what was refused is kept here.
  let refusal: AppError | undefined;
  const refuse = (message: string): never => {
    refusal = new AppError('too-large', message);
    throw refusal;
  };
  async function* counted(): AsyncGenerator<Uint8Array> {
    for await (const chunk of source instanceof Uint8Array ? [source] : source) {
      taken += chunk.length;
      if (taken > limit + overhead) refuse(`The compressed file is larger than ${mebibytes(limit)}, which is the most that it may be unpacked.`);
      yield chunk;
    }
  }
  try {
    await pipeline(Readable.from(counted()), gunzip, async (unpacked: AsyncIterable<Uint8Array>) => {
      for await (const part of unpacked) {
        given += part.length;
        if (given > limit) refuse(`The file grows beyond ${mebibytes(limit)} when it is unpacked; that is the most allowed.`);
        parts.push(part);
      }
    });
  } catch (error) {
    if (refusal) throw refusal;
    // zlib marks its own faults; one of the source (a connection that broke) is not about gzip.
    if (!(error instanceof Error && 'errno' in error && 'code' in error && String(error.code).startsWith('Z_'))) throw error;
    throw new AppError('malformed-gzip', `The gzip data is damaged or cut short: ${error.message}, after ${given} unpacked bytes.`, [], { cause: error });
  }
  if (gunzip.bytesWritten < taken) throw new AppError('malformed-gzip', `${taken - gunzip.bytesWritten} bytes follow the end of the gzip data.`);
  return Buffer.concat(parts);
}
