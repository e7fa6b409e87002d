import { z } from 'zod';
import { entry, entryList, entryListQuery } from '#shared/contracts/entries.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { pageFrom, readTimeCursor } from '#api/lib/cursor.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { readArchive } from './archive.ts';
import { presentItem } from './presenter.ts';
import { listEntries } from './public-entries.ts';
import { readEntry, readStored, type StoredKind } from './service.ts';

const accession = z.string().max(20);
const versionParams = z.object({ accession, version: z.coerce.number().int().min(1).max(1_000_000) });

const stored = (kind: StoredKind, produces: string, summary: string): Route =>
  defineRoute({
    method: 'get',
    path: `/api/v1/entries/:accession/v/:version/${kind}`,
    action: 'public.read',
    summary,
    params: versionParams,
    produces: [produces],
    handler: async ({ em, params, header }) => readStored(em, params.accession, params.version, kind, header('if-none-match')),
  });

export const entryRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/entries',
    action: 'public.read',
    summary: 'Entries, each by its latest public version, newest first.',
    query: entryListQuery,
    response: entryList,
    handler: async ({ em, query }) => {
      const { limit, cursor, ...filter } = query;
      const found = await listEntries(em, filter, limit, readTimeCursor(cursor));
      const rows = await em.find(EntryVersion, { id: { $in: found.map((v) => v.id) } }, { populate: ['device.organisation'], exclude: ['dataset', 'summary', 'sealedPoints', 'review'] });
      const byId = new Map(rows.map((row) => [row.id, row]));
      const items = found.flatMap((version) => {
        const row = byId.get(version.id);
        return row ? [{ ...version, row }] : [];
      });
      return pageFrom(items, limit, (v) => [v.frozenAt.toISOString(), v.accession], presentItem);
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession',
    action: 'public.read',
    summary: 'The latest public version of an entry.',
    params: z.object({ accession }),
    response: entry,
    handler: async ({ em, params }) => readEntry(em, params.accession, null),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version',
    action: 'public.read',
    summary: 'One version of an entry.',
    params: versionParams,
    response: entry,
    handler: async ({ em, params }) => readEntry(em, params.accession, params.version),
  }),
  stored('dataset', 'application/json', 'The dataset exactly as it was submitted, after Content-Encoding is removed.'),
  stored('result', 'application/json', 'The result in its RFC 8785 form, as it was frozen.'),
  stored('replicates', 'application/octet-stream', 'The replicates: figures by replicates, row-major, float64 little-endian.'),
  stored('seal', 'application/json', 'The revealed seal of the run sheet.'),
  stored('run-sheet', 'application/json', 'The run sheet, with the digest by which its seal was committed to.'),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/archive',
    action: 'public.read',
    summary: 'One zip file with dataset, run sheet, seal, result, replicates, their digests and RO-Crate metadata; the same version always gives the same bytes.',
    params: versionParams,
    produces: ['application/zip'],
    handler: async ({ em, params, header, deps }) => readArchive(em, params.accession, params.version, header('if-none-match'), deps.config.publicUrl),
  }),
];
