import * as z from 'zod';
import { instant } from './common';

export const healthPath = '/api/health';

/** What works, without signing in. */
export const health = z.object({
  status: z.enum(['ok', 'degraded']),
  now: instant,
  database: z.enum(['ok', 'failing']),
  sources: z.array(z.object({ name: z.string(), connected: z.boolean(), lagSeconds: z.number().nullable() })),
  /** When the last collect-and-evaluate cycle ended, and how. */
  lastCycle: z.object({ endedAt: instant, ok: z.boolean() }).nullable(),
});
export type Health = z.infer<typeof health>;
