import { readConfig } from './config/config.ts';
import { allJobs } from './jobs/all-jobs.ts';
import { startWorker } from './jobs/start-worker.ts';
import { makeDeps } from './lib/make-deps.ts';
import { runUntilTold } from './lib/run-until-told.ts';

/** The worker process: takes jobs, estimates in threads, delivers mail, keeps house. */
const deps = await makeDeps(readConfig());
let end = (_code: number): void => undefined;
const worker = await startWorker(deps, allJobs, { onLeaseLost: () => end(1) });
({ end } = runUntilTold(deps.log, async () => {
  await worker.stop();
  await deps.close();
}));
deps.log.info({ jobs: allJobs.map((job) => job.name) }, 'taking jobs');
