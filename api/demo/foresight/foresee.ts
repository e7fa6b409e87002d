import { availableParallelism } from 'node:os';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { SheetOrder, SheetOutcome } from './work.ts';

const isLong = (order: SheetOrder): boolean => order.sheet.register.length > 1;

/** Seconds of one core, roughly, for the share done. */
const costOf = (order: SheetOrder): number => order.runs.length * (isLong(order) ? 14 : 1);

/** Pairs spread among the short ones and none at the end: the count goes on, and all cores are busy to the last. */
const spread = (orders: readonly SheetOrder[]): SheetOrder[] => {
  const mixed = orders.filter((order) => !isLong(order));
  orders.filter(isLong).forEach((order, i) => mixed.splice(i * 11, 0, order));
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
