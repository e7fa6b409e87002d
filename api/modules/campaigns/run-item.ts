import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { sha256Hex } from '#shared/formats/canonical-json.ts';
import type { Seal } from '#shared/formats/types.ts';
import type { EstimateDatasetOutput, EstimateReport } from '#api/jobs/tasks/estimate-dataset.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { keepFactors, readFactors } from '#api/modules/run-sheets/factor-store.ts';
import { readBytes } from '#api/modules/submissions/file-store.ts';
import { lockCampaign, moveItem } from './store.ts';

export interface ItemKey {
  campaign: string;
  entryVersion: string;
  /** The job that was sent for it: an older one finds nothing to do. */
  jobId: string;
}

interface Begun {
  method: string;
  accession: string;
  version: number;
  replicates: number;
  bytes_sha256: string;
  sealed: boolean;
  run_sheet_id: string | null;
}

const stateNow = `(select s.state from entry_state s where s.accession = v.accession and s.version = v.version order by s.id desc limit 1)`;

/** Takes the item up, or puts it where it belongs if it is not to be done now. Null: nothing to do. */
const begin = (work: Work, { campaign: id, entryVersion, jobId }: ItemKey): Promise<Begun | null> =>
  inTransaction(work, async ({ em, clock }) => {
    const campaign = await lockCampaign(em, id);
    const [item] = await runSql<{ state: string }>(em, 'select state from campaign_item where campaign_id = $1 and entry_version_id = $2 and job_id = $3', [id, entryVersion, jobId]);
    if (item?.state !== 'queued' && item?.state !== 'running') return null;
    const at = clock.now();
    const put = async (state: 'waiting' | 'cancelled' | 'skipped' | 'done', fault: string | null = null): Promise<null> => {
      await moveItem(em, id, entryVersion, { state, at, fault });
      return null;
    };
    if (campaign.state === 'paused') return put('waiting');
    if (campaign.state !== 'running') return put('cancelled');
    const [entry] = await runSql<Begun & { state: string; present: boolean }>(em, `select $2 as method, v.accession, v.version, v.replicates, v.bytes_sha256, v.sealed, v.run_sheet_id, ${stateNow} as state,
      exists (select 1 from entry_result r where r.entry_version_id = v.id and r.method = $2) as present from entry_version v where v.id = $1`, [entryVersion, campaign.method]);
    if (!entry) throw new Error(`The version ${entryVersion} of ${id} is not there.`);
    if (entry.present) return put('done');
    if (entry.state === 'withdrawn') return put('skipped', 'The entry was withdrawn; its data is no longer used.');
    await moveItem(em, id, entryVersion, { state: 'running', at, jobId });
    return entry;
  });

const readInput = async (work: Work, { accession, version, bytes_sha256, sealed }: Begun): Promise<{ bytes: Buffer; seal: Seal | null }> => {
  const name = versionedAccessionOf(accession, version);
  const bytes = await readBytes(work.em, 'entry', accession, version, 'dataset');
  const seal = sealed ? await readBytes(work.em, 'entry', accession, version, 'seal') : null;
  if (!bytes || (sealed && !seal)) throw new Error(`${name} has no ${bytes ? 'seal' : 'dataset'} in the record.`);
  if (sha256Hex(bytes) !== bytes_sha256) throw new Error(`The stored dataset of ${name} does not have the digest it was frozen with.`);
  return { bytes, seal: seal ? (JSON.parse(seal.toString('utf8')) as Seal) : null };
};

/** Adds the result beside the frozen one. A second run of the same item finds it there and adds nothing. */
const finish = (work: Work, key: ItemKey, entry: Begun, output: EstimateDatasetOutput): Promise<void> =>
  inTransaction(work, async ({ em, clock }) => {
    await lockCampaign(em, key.campaign);
    const at = clock.now();
    const [entryNow] = await runSql<{ state: string }>(em, `select ${stateNow} as state from entry_version v where v.id = $1`, [key.entryVersion]);
    if (entryNow?.state === 'withdrawn') return moveItem(em, key.campaign, key.entryVersion, { state: 'skipped', at, fault: 'The entry was withdrawn while it was estimated; the result was not kept.' });
    const added = await runSql(em, `insert into entry_result (entry_version_id, method, campaign_id, result, result_sha256, replicates, replicates_sha256, replicate_count, summary, made_at)
      values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10) on conflict do nothing returning method`, [
      key.entryVersion, entry.method, key.campaign, output.result, output.resultSha256, output.replicates, output.replicatesSha256, output.summary.replicates, JSON.stringify(output.summary), at,
    ]);
    if (entry.run_sheet_id !== null) await keepFactors(em, entry.run_sheet_id, output.factors, at);
    await moveItem(em, key.campaign, key.entryVersion, { state: 'done', at });
    if (added.length > 0) recordAudit(em, { at, action: 'entry.add-result', subjectType: 'entry', subjectId: versionedAccessionOf(entry.accession, entry.version), detail: { campaign: key.campaign, method: entry.method, resultSha256: output.resultSha256 } });
  });

/** After the last attempt, or where the estimate itself says that there is none: the item has failed, with its reason. */
export const failItem = (work: Work, { campaign, entryVersion, jobId }: ItemKey, reason: string): Promise<void> =>
  inTransaction(work, async ({ em, clock }) => {
    await lockCampaign(em, campaign);
    await runSql(em, `update campaign_item set state = 'failed', fault = $4, changed_at = $5 where campaign_id = $1 and entry_version_id = $2 and job_id = $3 and state in ('queued', 'running')`, [campaign, entryVersion, jobId, reason, clock.now()]);
  });

/**
 * Re-estimates one version from its stored bytes and revealed seal, with the task that estimates submissions. What it keeps
 * is written in one transaction at its end, so a second run after a crash does no harm.
 */
export const runItem = async (work: Work, key: ItemKey, options: { signal?: AbortSignal; onProgress?: (report: EstimateReport) => void } = {}): Promise<void> => {
  const entry = await begin(work, key);
  if (!entry) return;
  try {
    const factors = entry.run_sheet_id === null ? [] : await readFactors(work.em, entry.run_sheet_id, work.clock.now());
    const output = await work.runInThread('estimate-dataset', { ...(await readInput(work, entry)), factors, replicates: entry.replicates, method: entry.method }, options);
    await finish(work, key, entry, output);
  } catch (fault) {
    if (!(fault instanceof AppError)) throw fault;
    await failItem(work, key, fault.message);
  }
};
