import { z } from 'zod';
import { citation, citationQuery } from '#shared/contracts/citations.ts';
import { citationFormats } from '#shared/citation/formats.ts';
import { nameOf, pageUrl } from '#shared/citation/record.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { bytes } from '#api/lib/reply.ts';
import { presentCitation } from './presenter.ts';
import { readCited } from './record.ts';

export const citationRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/citation',
    action: 'public.read',
    summary: 'How to cite a version: a file in the format asked for, or three styles and all formats. It stays when the version is withdrawn.',
    params: z.object({ accession: z.string().max(20), version: z.coerce.number().int().min(1).max(1_000_000) }),
    query: citationQuery,
    response: citation,
    produces: Object.values(citationFormats).map(({ mediaType }) => mediaType),
    handler: async ({ em, params, query, deps }) => {
      const { record } = await readCited(em, params.accession, params.version, deps.config.publicUrl);
      if (!query.format) return presentCitation(record);
      const format = citationFormats[query.format];
      return bytes(format.write(record), `${format.mediaType}; charset=utf-8`, { headers: { 'content-disposition': `inline; filename="${nameOf(record)}${format.extension}"`, 'x-content-type-options': 'nosniff', link: `<${pageUrl(record)}>; rel="describes"; type="text/html"` } });
    },
  }),
];
