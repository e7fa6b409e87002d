import { z } from 'zod';
import { citationFormatNames } from '#shared/citation/format-names.ts';

/** GET /api/v1/entries/{accession}/v/{n}/citation : with `format` the citation as a file, else what there is to choose from. */
export const citationQuery = z.object({ format: z.enum(citationFormatNames).optional() });
export const citation = z.object({
  name: z.string(),
  /** The address to cite by. */
  url: z.string(),
  /** Null while none is registered. `resolves` false: of the local stand-in. */
  doi: z.object({ value: z.string(), resolves: z.boolean() }).nullable(),
  styles: z.array(z.object({ style: z.enum(['apa', 'harvard', 'vancouver']), label: z.string(), text: z.string() })),
  formats: z.array(z.object({ format: z.enum(citationFormatNames), label: z.string(), mediaType: z.string(), href: z.string() })),
});
export type Citation = z.infer<typeof citation>;
