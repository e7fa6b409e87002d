import { z } from 'zod';

/** GET /api/health */
export const health = z.object({ status: z.enum(['ok', 'degraded']), database: z.enum(['ok', 'down']), queue: z.enum(['ok', 'down']), methods: z.array(z.string()) });
export type Health = z.infer<typeof health>;
