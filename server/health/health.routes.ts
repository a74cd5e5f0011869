import { healthPath, type Health } from '@shared/api/health';
import { Router } from 'express';
import { openToAll } from '../access/require';
import type { Clock } from '../clock';
import type { Database } from '../db/database';

export interface HealthDependencies {
  readonly database: Database;
  readonly clock: Clock;
  /** How the last collect-and-evaluate cycle ended; null before the first. */
  readonly lastCycle: () => Health['lastCycle'];
}

/** Cycles come each minute; this long without one is a fault of its own. */
const cycleOverdueAfter = 5 * 60_000;

/** What works, for whoever watches over the server: 200 while it can be used, 503 when it cannot. */
export function healthRouter(deps: HealthDependencies): Router {
  const router = Router();
  router.get(healthPath, openToAll, async (_req, res) => {
    const answer = await readHealth(deps);
    res.status(answer.database === 'ok' ? 200 : 503).json(answer);
  });
  return router;
}

async function readHealth({ database, clock, lastCycle }: HealthDependencies): Promise<Health> {
  const now = clock.now();
  const cycle = lastCycle();
  const common = { now, lastCycle: cycle };
  try {
    const rows = await database.models.sources.findAll({ where: { paused: false }, order: ['id'] });
    const tags = await database.models.tags.findAll({ attributes: ['sourceId', 'watermark'] });
    const sources = rows.map((row) => {
      const marks = tags.flatMap((tag) =>
        tag.sourceId === row.id && tag.watermark !== null ? [tag.watermark] : [],
      );
      return {
        name: row.name,
        connected: row.connected === true,
        lagSeconds: marks.length === 0 ? null : Math.max(0, (now - Math.min(...marks)) / 1000),
      };
    });
    const isWell =
      rows.every((row) => row.connected !== false) &&
      (cycle === null || (cycle.ok && now - cycle.endedAt < cycleOverdueAfter));
    return { ...common, status: isWell ? 'ok' : 'degraded', database: 'ok', sources };
  } catch {
    // Whatever the database says, the answer to "does it work" is no; the log has its words from whoever needed it.
    return { ...common, status: 'degraded', database: 'failing', sources: [] };
  }
}
