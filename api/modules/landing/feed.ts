import type { EntityManager } from '@mikro-orm/postgresql';
import { AppError } from '#shared/errors/app-error.ts';
import { feedPage, writeFeed, type FeedItem } from '#shared/landing/feed.ts';
import { runSql } from '#api/lib/run-sql.ts';

interface Row {
  event: FeedItem['event'];
  accession: string;
  version: number;
  at: string;
  title: string;
  contributors: { name: string }[];
  device: string;
  provider: string;
  reason: string | null;
}

const itemOf = (row: Row): FeedItem => ({
  event: row.event, accession: row.accession, version: row.version, at: new Date(row.at).toISOString(), title: `${row.device}: ${row.title}`, authors: row.contributors.map(({ name }) => name),
  summary: row.event === 'withdrawn' ? `Withdrawn: ${row.reason ?? 'no reason is on record.'}` : `Frozen: ${row.device} of ${row.provider}.`,
});

/** Leaves of the log from one number up to, not including, another; newest first. */
const itemsOf = async (em: EntityManager, from: number, to: number): Promise<FeedItem[]> =>
  (await runSql<Row>(
    em,
    `select l.event, l.accession, l.version, l.at, v.title, v.dataset -> 'contributors' as contributors, d.name as device, o.name as provider,
            (select s.reason from entry_state s where s.accession = l.accession and s.version = l.version and s.state = 'withdrawn') as reason
       from log_leaf l join entry_version v on v.accession = l.accession and v.version = l.version join device d on d.id = v.device_id join organisation o on o.id = d.organisation_id
      where l.index >= $1 and l.index < $2 order by l.index desc`,
    [from, to],
  )).map(itemOf);

/** The current feed, or one of its archive pages of so many events: in the order of the log. */
export const readFeed = async (em: EntityManager, archive: number | null, registry: string, onPage = feedPage): Promise<string> => {
  const [size] = await runSql<{ size: number }>(em, 'select size from log_size');
  const total = size?.size ?? 0;
  const archives = Math.floor(total / onPage);
  if (archive !== null && archive >= archives) throw new AppError('not-found', `The feed has ${archives} full pages, counted from 0; ${archive} is not among them.`);
  const [from, to] = archive === null ? [Math.max(0, total - onPage), total] : [archive * onPage, (archive + 1) * onPage];
  return writeFeed({ registry, archive, archives, items: await itemsOf(em, from, to) });
};
