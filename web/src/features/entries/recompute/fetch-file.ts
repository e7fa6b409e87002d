import { problem } from '#shared/contracts/common.ts';
import type { RecomputeFault } from './messages.ts';

/** A run that cannot go on, with words for the screen. */
export class RecomputeStopped extends Error {
  readonly fault: RecomputeFault;
  constructor(fault: RecomputeFault) {
    super(fault.detail);
    this.fault = fault;
  }
}

const stop = (title: string, detail: string, again: boolean): never => {
  throw new RecomputeStopped({ title, detail, again });
};

async function refused(response: Response, what: string): Promise<never> {
  const parsed = problem.safeParse(await response.json().catch(() => null));
  const said = parsed.success ? parsed.data.detail : `The registry answered with status ${response.status}.`;
  if (response.status === 410) return stop('The data was withdrawn', `${said} Without it nothing can be recomputed. Load this page again for its state now.`, false);
  if (response.status === 404) return stop(`The ${what} is not handed out`, `${said} Under an embargo everything stays closed until its day; otherwise load this page again for its state now.`, true);
  if (response.status === 429) return stop('Too many requests', `${said} Wait a minute, then try again.`, true);
  return stop(`The ${what} could not be read`, `${said} Try again in a minute.`, true);
}

/** One file of the entry, exactly as it is stored, and no more of it than `most` bytes. */
export async function fetchFile(address: string, what: string, most: number): Promise<Uint8Array> {
  const response = await fetch(address).catch(() => stop('The registry could not be reached', `The ${what} did not arrive. Check the connection, then try again; nothing of yours is lost.`, true));
  if (!response.ok) return refused(response, what);
  const reader = response.body?.getReader();
  const parts: Uint8Array[] = [];
  let size = 0;
  for (;;) {
    const step = await reader?.read().catch(() => stop('The connection broke', `The ${what} broke off after ${size} bytes. Try again.`, true));
    if (!step || step.done) break;
    size += step.value.byteLength;
    if (size > most) {
      await reader?.cancel();
      return stop(`The ${what} is too large`, `It is larger than ${most / 2 ** 20} MiB, the most that is read here. Use the command beside.`, false);
    }
    parts.push(step.value);
  }
  const whole = new Uint8Array(size);
  parts.reduce((at, part) => {
    whole.set(part, at);
    return at + part.byteLength;
  }, 0);
  return whole;
}
