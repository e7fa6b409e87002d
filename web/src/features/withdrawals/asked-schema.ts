import { z } from 'zod';
import { readVersionedAccession } from '#shared/domain/ids.ts';
import { withdrawalAsked } from '#shared/contracts/withdrawals.ts';

/** The form names the version as people write it: "EVB-000042.1". */
export const askedSchema = withdrawalAsked.extend({
  entry: z.string().trim().refine((text) => readVersionedAccession(text) !== null, { error: (issue) => `${JSON.stringify(String(issue.input))} is not a version of an entry, such as EVB-000042.1.` }),
});
export type AskedFields = z.infer<typeof askedSchema>;
