import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';
import { pointerOf } from '#shared/formats/pointer.ts';

/** Faults gathered up to the limit; whoever gathers looks at `full` in long loops and stops. */
export class Faults {
  readonly list: ErrorDetail[] = [];

  get full(): boolean {
    return this.list.length >= limits.errors;
  }

  get none(): boolean {
    return this.list.length === 0;
  }

  /** Takes over what another list gathered, up to the limit. */
  join(other: Faults): void {
    this.list.push(...other.list.slice(0, limits.errors - this.list.length));
  }

  add(path: readonly (string | number)[], message: string): void {
    if (!this.full) this.list.push({ pointer: pointerOf(...path), message });
  }
}
