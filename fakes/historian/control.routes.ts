import { Router } from 'express';
import {
  clockSetting,
  historianControlPaths,
  type HistorianState,
  type Truth,
  truthQuery,
} from '@shared/api/historian';
import { FakeProblem, parseInput } from '../http/problem';
import { minute, type SamplePoint, samplePoints, type SiteSimulation } from './simulation/site';

/** Most points of truth in one answer. */
const mostPoints = 20_000;

/** What demo and tests may ask of the simulation; `setNow` is there only with a manual clock. */
export function controlRouter(
  simulation: SiteSimulation,
  now: () => number,
  setNow: ((now: number) => void) | undefined,
): Router {
  const router = Router();

  router.get(historianControlPaths.state, (_req, res) => {
    const state: HistorianState = {
      now: now(),
      clock: setNow === undefined ? 'real' : 'manual',
      seed: simulation.seed,
      startAt: simulation.startAt,
      towers: simulation.records.map(({ spec: { id, name, components } }) => ({
        id,
        name,
        components: [...components],
      })),
    };
    res.json(state);
  });

  router.get(historianControlPaths.truth, (req, res) => {
    const { tower, from, to, step } = parseInput(truthQuery, req.query);
    const record = simulation.records.find(({ spec }) => spec.id === tower);
    if (!record)
      throw new FakeProblem(404, 'no-such-tower', `There is no tower "${tower}"; see /control/state.`);
    const first = Math.ceil(from / minute) * minute;
    if ((to - first) / step > mostPoints)
      throw new FakeProblem(
        400,
        'too-much',
        `Ask for at most ${mostPoints} points: shorten the interval or widen step.`,
      );
    const end = Math.min(to, now() + 1);
    const t: number[] = [];
    for (let time = first; time < end; time += step) if (time >= simulation.startAt) t.push(time);
    const { components } = record.spec;
    const at = (point: SamplePoint) =>
      Object.fromEntries(
        components.map((id, i) => {
          const column = samplePoints.indexOf(point) * components.length + i;
          return [id, t.map((time) => record.truth.at(column, simulation.rowOf(time)))];
        }),
      );
    const answer: Truth = {
      tower,
      components: [...components],
      t,
      overhead: at('overhead'),
      rundown: at('rundown'),
      bottoms: at('bottoms'),
    };
    res.json(answer);
  });

  router.post(historianControlPaths.clock, (req, res) => {
    if (setNow === undefined)
      throw new FakeProblem(
        409,
        'real-clock',
        'This historian keeps real time; start it with a manual clock to set it.',
      );
    const { now: wanted } = parseInput(clockSetting, req.body);
    if (wanted < now())
      throw new FakeProblem(409, 'clock-goes-forward', `The clock only goes forward; it is ${now()} now.`);
    setNow(wanted);
    res.json({ now: now() });
  });

  return router;
}
