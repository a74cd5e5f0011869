import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import * as z from 'zod';
import { instant } from '@shared/api/common';
import { CannotStart } from '../http/run-fake';

const hour = 3_600_000;
const week = 7 * 24 * hour;
const defaultSeed = 20_260_901;

const origin = z.object({ seed: z.int(), startAt: instant.multipleOf(60_000) });
export type Origin = z.infer<typeof origin>;

/**
 * Seed and first minute of the history, kept in DATA_DIR/historian.json so that after a restart the same minutes have the
 * same values. Where there is no file they are chosen: a whole hour, `weeks` before now.
 *
 * @throws CannotStart when the file is damaged or holds another seed than the one asked for
 */
export function originOf(dataDir: string, now: number, weeks: number, seed: number | undefined): Origin {
  const path = join(dataDir, 'historian.json');
  const kept = readIfThere(path);
  if (kept === undefined) {
    const chosen = { seed: seed ?? defaultSeed, startAt: Math.floor(now / hour) * hour - weeks * week };
    mkdirSync(dataDir, { recursive: true });
    // Written beside and renamed: a process that dies here leaves no half file.
    writeFileSync(`${path}.new`, `${JSON.stringify(chosen)}\n`);
    renameSync(`${path}.new`, path);
    return chosen;
  }
  const parsed = origin.safeParse(parseJson(kept));
  if (!parsed.success)
    throw new CannotStart(`${path} cannot be read as seed and startAt; delete it to begin a new history.`);
  if (seed !== undefined && seed !== parsed.data.seed)
    throw new CannotStart(
      `${path} holds a history of seed ${parsed.data.seed}, HISTORIAN_SEED says ${seed}; delete the file to begin anew.`,
    );
  if (parsed.data.startAt > now)
    throw new CannotStart(`${path} begins in the future; delete it, or put the clock right.`);
  return parsed.data;
}

function readIfThere(path: string): string | undefined {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return undefined;
    throw error;
  }
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined; // said by the caller, with the file's name
  }
}
