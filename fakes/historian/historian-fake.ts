import express from 'express';
import { answerProblems, nothingHere } from '../http/problem';
import { requireToken } from '../http/bearer-token';
import { Archive } from './archive';
import { controlRouter } from './control.routes';
import { SiteSimulation } from './simulation/site';
import type { TowerSpec } from './simulation/tower-spec';
import { depropaniser } from './towers/depropaniser';
import { v1Router } from './v1.routes';

export interface HistorianFakeOptions {
  readonly seed: number;
  /** Time of the first value [UTC ms], a whole minute. */
  readonly startAt: number;
  readonly now: () => number;
  /** Given: the clock is manual and POST /control/clock calls this, never with an earlier time. */
  readonly setNow?: (now: number) => void;
  readonly token: string;
  /** Given: /control is there, for whoever has it. */
  readonly controlToken?: string;
  readonly towers?: readonly TowerSpec[];
}

export interface HistorianFake {
  readonly app: express.Express;
  readonly simulation: SiteSimulation;
}

/** A historian with simulated towers behind it, simulated up to now; it never listens by itself. */
export function createHistorianFake(options: HistorianFakeOptions): HistorianFake {
  const simulation = new SiteSimulation(options.towers ?? [depropaniser], options.seed, options.startAt);
  /** Brought up to date whenever somebody asks: no timer, so time may as well be a test's. */
  const now = () => {
    const time = options.now();
    simulation.advanceTo(time);
    return time;
  };
  now();
  const app = express();
  app.disable('x-powered-by');
  app.disable('etag');
  app.get('/health', (_req, res) => {
    res.json({ status: 'ok' });
  });
  if (options.controlToken !== undefined) app.use('/control', requireToken(options.controlToken));
  app.use('/v1', requireToken(options.token));
  app.use(express.json({ limit: '4mb' }));
  app.use(v1Router(new Archive(simulation), now));
  if (options.controlToken !== undefined) app.use(controlRouter(simulation, now, options.setNow));
  app.use(nothingHere);
  app.use(answerProblems);
  return { app, simulation };
}
