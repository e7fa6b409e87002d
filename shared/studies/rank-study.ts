import { z } from 'zod';

const count = z.int().min(0);

const scenarioSchema = z.object({
  id: z.string(),
  title: z.string(),
  /** True values of the devices, in standard errors of one measured with 1,000 shots. */
  offsets: z.array(z.number()),
  shots: z.array(z.int()),
  boards: count,
  /** Boards whose ranges all held. */
  covered: count,
  /** Boards on which all percentile intervals of the bootstrap rank held: why they are not shown. */
  naiveCovered: count,
  /** Ranks in a range, mean over devices and boards. */
  meanWidth: z.number(),
});

export const rankStudySchema = z.object({
  format: z.literal('evenbeam.study.ranks'),
  method: z.string(),
  date: z.string(),
  command: z.string(),
  seedRule: z.string(),
  level: z.number(),
  replicates: z.int(),
  notes: z.array(z.string()),
  scenarios: z.array(scenarioSchema),
});

export type RankStudy = z.infer<typeof rankStudySchema>;
