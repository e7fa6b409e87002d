import { availableParallelism } from 'node:os';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { SheetOrder, SheetOutcome } from './work.ts';

const sizeOf = (order: SheetOrder): number => order.sheet.register.length;

/** Seconds of one core by size of the register, measured; for the share done. */
const secondsBySize: readonly number[] = [0, 1, 11, 17, 23, 30];
const costOf = (order: SheetOrder): number => order.runs.length * (secondsBySize[sizeOf(order)] ?? 30);

/** Registers spread among the short ones, the longest first and none at the end: the count goes on, and all cores are busy to the last. */
const spread = (orders: readonly SheetOrder[]): SheetOrder[] => {
  const mixed = orders.filter((order) => sizeOf(order) === 1);
  const long = orders.filter((order) => sizeOf(order) > 1).sort((a, b) => costOf(b) - costOf(a));
  const apart = 1 + Math.floor(mixed.length / (long.length + 1));
  long.forEach((order, i) => mixed.splice(i * apart, 0, order));
  return mixed;
};

/** Draws, runs and estimates everything that the demo will need, in threads on all cores. `onRun` is told the share done after each file. */
export const foresee = async (orders: readonly SheetOrder[], onRun: (done: number, share: number) => void): Promise<Map<string, SheetOutcome>> => {
  const pool = new Piscina({ filename: new URL('./thread-from-source.mjs', import.meta.url).href, minThreads: 0, maxThreads: availableParallelism() });
  const whole = orders.reduce((sum, order) => sum + costOf(order), 0);
  const outcomes = new Map<string, SheetOutcome>();
  let [done, spent] = [0, 0];
  const one = async (order: SheetOrder): Promise<void> => {
    const { port1, port2 } = new MessageChannel();
    port1.on('message', () => {
      done += 1;
      spent += costOf(order) / order.runs.length;
      onRun(done, spent / whole);
    });
    const outcome = (await pool.run({ order, port: port2 }, { transferList: [port2] })) as SheetOutcome;
    outcomes.set(order.key, outcome);
  };
  try {
    await Promise.all(spread(orders).map(one));
    return outcomes;
  } finally {
    await pool.destroy();
  }
};
