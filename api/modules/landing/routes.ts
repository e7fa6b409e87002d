import { z } from 'zod';
import { pageUrl } from '#shared/citation/record.ts';
import { linksetOf } from '#shared/landing/links.ts';
import { toSchemaOrg } from '#shared/landing/schema-org.ts';
import type { Landing } from '#shared/landing/landing.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { bytes } from '#api/lib/reply.ts';
import { readLanding } from './read-landing.ts';

const params = z.object({ accession: z.string().max(20), version: z.coerce.number().int().min(1).max(1_000_000) });

const form = (path: string, mediaType: string, summary: string, write: (landing: Landing) => unknown): Route =>
  defineRoute({
    method: 'get',
    path: `/api/v1/entries/:accession/v/:version/${path}`,
    action: 'public.read',
    summary,
    params,
    produces: [mediaType],
    handler: async ({ em, params: { accession, version }, deps }) => {
      const landing = await readLanding(em, accession, version, deps.config.publicUrl);
      return bytes(`${JSON.stringify(write(landing), null, 2)}\n`, mediaType, { headers: { link: `<${pageUrl(landing.record)}>; rel="describes"; type="text/html"` } });
    },
  });

export const landingRoutes: Route[] = [
  form('linkset', 'application/linkset+json', 'All typed links of a version and of its files (RFC 9264).', linksetOf),
  form('schema-org', 'application/ld+json', 'A version as a schema.org Dataset in JSON-LD, as it stands in its page.', toSchemaOrg),
];
