import { AppError } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';

/**
 * Unpacks gzip in the browser and stops as soon as more than `limit` bytes have come out.
 * @throws AppError `too-large` or `malformed-gzip`
 */
export async function gunzipBounded(source: Blob, limit: number = limits.bytes): Promise<Uint8Array> {
  const reader = source.stream().pipeThrough(new DecompressionStream('gzip')).getReader();
  const parts: Uint8Array[] = [];
  let size = 0;
  for (;;) {
    const step = await reader.read().catch((cause: unknown) => {
      throw new AppError('malformed-gzip', `The gzip data is damaged or cut short, after ${size} unpacked bytes.`, [], { cause });
    });
    if (step.done) break;
    size += step.value.byteLength;
    if (size > limit) {
      await reader.cancel();
      throw new AppError('too-large', `The file grows beyond ${limit / 2 ** 20} MiB when it is unpacked; that is the most allowed.`);
    }
    parts.push(step.value);
  }
  const whole = new Uint8Array(size);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.byteLength;
  }
  return whole;
}
