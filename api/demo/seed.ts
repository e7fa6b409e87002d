import type { Config } from '#api/config/config.ts';
import { makeDeps, type OwnedDeps } from '#api/lib/make-deps.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { lastDay, scriptOf } from './acts/script.ts';
import { foresee } from './foresight/foresee.ts';
import { ordersOf } from './foresight/orders.ts';
import { liveThrough } from './live.ts';
import { stories } from './plan/index.ts';
import type { Story } from './plan/story.ts';

export interface SeedOptions {
  /** Settings of the registry to be filled; its invented people are on record. */
  config: Config;
  /** Told as things go on: what is being done, and the share of the whole that is done, 0 to 1. */
  progress: (words: string, share: number) => void;
  /** Only these stories, for tests; all of them otherwise. */
  told?: readonly Story[];
  /** When it is made; the clock's now unless told. */
  now?: Date;
}

/** Share of the whole that goes to measuring and estimating; measured on two cores. */
const ahead = 0.72;

/** The number that the registry will give to its next run sheet. */
const nextSheet = async (deps: OwnedDeps): Promise<number> => {
  const [row] = await runSql<{ next: string }>(deps.orm.em.fork(), 'select case when is_called then last_value + 1 else last_value end as next from run_sheet_number');
  return Number(row?.next);
};

/**
 * Fills a registry with the two years of the demo: run sheets are drawn, run on simulated devices with a hidden truth,
 * sent, checked, estimated, reviewed and frozen by the services that serve everyone, under a clock set to each day.
 * What takes long is done ahead, in threads on all cores; the rest is one transaction, so that a demo is there whole or
 * not at all, and an interrupted one is begun anew. The same on every machine, save for the ids that no file bears.
 */
export const seedDemo = async ({ config, progress, told = stories, now }: SeedOptions): Promise<void> => {
  const deps = await makeDeps(config);
  try {
    const orders = ordersOf(told, await nextSheet(deps));
    const files = orders.reduce((sum, order) => sum + order.runs.length, 0);
    progress(`Drawing ${orders.length} run sheets and measuring on simulated devices`, 0);
    const outcomes = await foresee(orders, (done, share) => progress(`Estimating ${done} of ${files}`, ahead * share));
    let month = '';
    await liveThrough(deps, scriptOf(told, now ?? deps.clock.now()), orders, outcomes, (act, share) => {
      const now = act.at.toISOString().slice(0, 7);
      if (now !== month) progress(`Reviewing and freezing, ${now}`, ahead + (1 - ahead) * share);
      month = now;
    });
    progress(`The demo registry is ready, from ${stories[0]?.day ?? ''} to ${lastDay.toISOString().slice(0, 10)}`, 1);
  } finally {
    await deps.close();
  }
};
