import { copyFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { QueryTypes } from 'sequelize';
import { openDatabase } from '../../server/db/database';
import { buildPrograms, removePrograms, run } from './support/built-server';
import { day, everythingStored, minute, startHistorian, startPlant } from './support/plant';
import { temporaryFolder } from './support/temporary-folder';

let programs: string;
beforeAll(async () => {
  programs = await buildPrograms({ collecting: 'tests/api/support/collecting-process.ts' });
});
afterAll(() => removePrograms(programs));

interface Standing {
  readonly watermark: number;
  readonly values: number;
  readonly last: number;
}

/** What must hold of whatever was committed: every value before the watermark, and every minute evaluated that they allow. */
async function expectWholeMinutes(file: string): Promise<void> {
  const database = await openDatabase(file);
  try {
    const read = <T extends object>(sql: string) =>
      database.sequelize.query<T>(sql, { type: QueryTypes.SELECT });
    const tags = await read<Standing>(
      'SELECT watermark, (SELECT count(*) FROM tag_value WHERE tag_id = tag.id) AS "values", (SELECT max(t) FROM tag_value WHERE tag_id = tag.id) AS last FROM tag',
    );
    const [estimates] = await read<{ n: number; last: number }>(
      'SELECT count(*) AS n, max(t) AS last FROM estimate',
    );
    const [sensor] = await read<{ evaluatedTo: number }>('SELECT evaluated_to AS evaluatedTo FROM sensor');
    for (const tag of tags) {
      expect(tag.watermark).toBe(tags[0]!.watermark);
      expect(tag.last).toBeLessThan(tag.watermark);
      expect(tag.watermark - tag.last).toBeLessThanOrEqual(minute);
      expect(tag.values).toBe(estimates!.n);
    }
    expect(estimates!.last).toBe(tags[0]!.last);
    expect(sensor!.evaluatedTo).toBe(estimates!.last + minute);
  } finally {
    await database.close();
  }
}

it(
  'killed ten times while it collects, it loses no value and leaves no half-written minute',
  { timeout: 180_000 },
  async () => {
    const historian = await startHistorian();
    const undisturbed = await startPlant(1, historian);
    const file = join(temporaryFolder(), 'killed.sqlite');
    // Folds the log into the file, so that a copy of the file alone is the whole database.
    await undisturbed.database.sequelize.query('PRAGMA wal_checkpoint(TRUNCATE)');
    copyFileSync(undisturbed.file, file);

    const collecting = join(programs, 'collecting.js');
    const end = undisturbed.clock.t + 30 * day;
    historian.now = end;
    let killed = 0;
    for (let round = 0; round < 10; round++) {
      const { child, output, ended } = run(collecting, {
        args: [file, String(undisturbed.clock.t + 3 * (round + 1) * day)],
      });
      while (!output().includes('collecting')) await new Promise((resolve) => setTimeout(resolve, 5));
      // Spread over the half second in which it reads, stores and evaluates its three days.
      await new Promise((resolve) => setTimeout(resolve, 40 + 53 * round));
      child.kill('SIGKILL');
      if ((await ended) === 'SIGKILL') killed++;
      await expectWholeMinutes(file);
    }
    expect(killed).toBeGreaterThanOrEqual(6);

    expect(await run(collecting, { args: [file, String(end)] }).ended).toBe(0);
    await undisturbed.advance(30 * day);
    const survivor = await openDatabase(file);
    const left = await everythingStored(survivor);
    await survivor.close();
    expect(left).toEqual(await everythingStored(undisturbed.database));
  },
);
