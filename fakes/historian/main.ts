import * as z from 'zod';
import { instant } from '@shared/api/common';
import { close, listen } from '../http/listen';
import { portSetting, readSettings, runFake } from '../http/run-fake';
import { createHistorianFake } from './historian-fake';
import { originOf } from './origin';

const settings = z.object({
  HISTORIAN_PORT: portSetting.default(4601),
  HISTORIAN_HOST: z.string().default('127.0.0.1'),
  HISTORIAN_TOKEN: z.string().min(1),
  HISTORIAN_CONTROL_TOKEN: z.string().min(1).optional(),
  DATA_DIR: z.string().min(1).default('.data'),
  HISTORIAN_SEED: z.coerce.number().int().optional(),
  HISTORIAN_WEEKS: z.coerce.number().int().min(1).max(52).default(6),
  /** UTC milliseconds: the clock stands there until POST /control/clock moves it. */
  HISTORIAN_MANUAL_CLOCK: z.coerce.number().pipe(instant).optional(),
});

await runFake('historian fake', async () => {
  const env = readSettings(settings, process.env);
  let standing = env.HISTORIAN_MANUAL_CLOCK;
  const now = () => standing ?? Date.now();
  const { seed, startAt } = originOf(env.DATA_DIR, now(), env.HISTORIAN_WEEKS, env.HISTORIAN_SEED);
  const began = performance.now();
  const { app, simulation } = createHistorianFake({
    seed,
    startAt,
    now,
    token: env.HISTORIAN_TOKEN,
    ...(standing === undefined ? {} : { setNow: (wanted: number) => (standing = wanted) }),
    ...(env.HISTORIAN_CONTROL_TOKEN === undefined ? {} : { controlToken: env.HISTORIAN_CONTROL_TOKEN }),
  });
  const seconds = ((performance.now() - began) / 1000).toFixed(1);
  const { server, port } = await listen(app, env.HISTORIAN_PORT, env.HISTORIAN_HOST);
  const minutes = (simulation.reached - startAt) / 60_000 + 1;
  console.log(
    `historian fake: http://${env.HISTORIAN_HOST}:${port} (${minutes} minutes since ${new Date(startAt).toISOString()}, simulated in ${seconds} s)`,
  );
  return () => close(server);
});
