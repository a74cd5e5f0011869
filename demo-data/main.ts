import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { pino } from 'pino';
import * as z from 'zod';
import { InlinePasswordHasher } from '../server/access/password-hasher';
import { openDatabase } from '../server/db/database';
import { loadDemo } from './load';

const environment = z
  .object({
    DATA_DIR: z.string().min(1),
    HISTORIAN_URL: z.url(),
    HISTORIAN_TOKEN: z.string().min(1),
    HISTORIAN_CONTROL_TOKEN: z.string().min(1),
    DEMO_SEED: z.coerce.number().int().default(7),
  })
  .parse(process.env);

mkdirSync(environment.DATA_DIR, { recursive: true });
const database = await openDatabase(join(environment.DATA_DIR, 'dewmark.sqlite'));
try {
  let told = 0;
  const loaded = await loadDemo({
    database,
    passwords: new InlinePasswordHasher(),
    logger: pino({ level: 'warn' }),
    now: Date.now(),
    seed: environment.DEMO_SEED,
    historian: {
      url: environment.HISTORIAN_URL,
      token: environment.HISTORIAN_TOKEN,
      controlToken: environment.HISTORIAN_CONTROL_TOKEN,
    },
    progress: (share) => {
      if (share < told + 0.1 && share < 1) return;
      told = share;
      console.log(`loading the demonstration: ${(100 * share).toFixed(0)} %`);
    },
  });
  if (!loaded) console.log('the demonstration is loaded already');
} finally {
  await database.close();
}
