/** Where services read the time. Tests and the demo registry bring their own. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };

/** A clock that stands still until it is told to move. */
export class SettableClock implements Clock {
  #now: Date;

  constructor(start: Date) {
    this.#now = start;
  }

  now(): Date {
    return new Date(this.#now);
  }

  set(instant: Date): void {
    this.#now = instant;
  }

  advance(milliseconds: number): void {
    this.#now = new Date(this.#now.getTime() + milliseconds);
  }
}
