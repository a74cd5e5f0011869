import { expect, it } from 'vitest';
import { samplesQuery, type NewSample } from '@shared/api/samples';
import { Problem } from '../../server/http/problem';
import { truth } from '@shared/api/historian';
import { minute, startPlant, tokens } from './support/plant';

const hour = 60 * minute;

/** Mole fractions by component. */
type Composition = Readonly<Record<string, number>>;

/** What the laboratory might state of an ordinary product; a test changes what it is about. */
const usual: Composition = {
  ethane: 0.015,
  propane: 0.97,
  isobutane: 0.0105,
  'n-butane': 0.0045,
  isopentane: 0,
  'n-pentane': 0,
};

function aResult(
  drawnAt: number,
  composition: Composition = usual,
  change: Partial<NewSample> = {},
): NewSample {
  return {
    towerId: 'depropaniser',
    point: 'overhead',
    drawnAt,
    receivedAt: drawnAt + hour,
    fractions: Object.entries(composition).map(([id, fraction]) => ({ id, fraction })),
    remark: '',
    ...change,
  };
}

/** The composition with its butanes and pentanes multiplied. */
function heavier(composition: Composition, factor: number): Composition {
  const light = ['ethane', 'propane'];
  const scaled = Object.entries(composition).map(
    ([id, fraction]) => [id, light.includes(id) ? fraction : factor * fraction] as const,
  );
  const sum = scaled.reduce((total, [, fraction]) => total + fraction, 0);
  return Object.fromEntries(scaled.map(([id, fraction]) => [id, fraction / sum]));
}

async function plantWithPerson(days = 2) {
  const plant = await startPlant(days);
  const user = (await plant.database.models.users.findOne({ where: { username: 'operator' } }))!;
  const person = { id: user.id, username: user.username, name: user.name, role: user.role };
  /** What the product really was at the tap at a time, as the laboratory would find it without error. */
  const truthAt = async (t: number): Promise<Composition> => {
    const query = new URLSearchParams({
      tower: 'depropaniser',
      from: String(t - 3 * minute),
      to: String(t - 2 * minute),
    });
    const answer = await fetch(`${plant.historian.url}/control/truth?${query.toString()}`, {
      headers: { authorization: `Bearer ${tokens.controlToken}` },
    });
    return Object.fromEntries(
      Object.entries(truth.parse(await answer.json()).rundown).map(([id, [fraction]]) => [id, fraction!]),
    );
  };
  return { ...plant, person, truthAt, enter: (draft: NewSample) => plant.intake.record(draft, person) };
}

it('uses a result that agrees: offset, band, journal and screens follow at once', async () => {
  const plant = await plantWithPerson();
  const drawnAt = plant.clock.t - 2 * hour;
  plant.events.length = 0;
  const outcome = await plant.enter(aResult(drawnAt, heavier(await plant.truthAt(drawnAt), 1.05)));
  expect(outcome.sample).toMatchObject({ state: 'used', enteredBy: 'Operator', drawnAt });
  const [effect] = outcome.effects;
  expect(effect!.after.offset).not.toBe(effect!.before.offset);
  expect(effect!.after.high! - effect!.after.low!).not.toBe(effect!.before.high! - effect!.before.low!);
  const [correction] = outcome.sample.corrections;
  expect(correction!.offsetAfter).toBeCloseTo(
    correction!.offsetBefore + correction!.gain * correction!.innovation,
    12,
  );
  const entries = await plant.database.models.journalEntries.findAll({ order: [['id', 'DESC']], limit: 2 });
  expect(entries.map(({ action }) => action)).toEqual(['sample-used', 'sample-entered']);
  expect(plant.events.map(({ type }) => type)).toEqual(['sample', 'sensor']);
  const next = await plant
    .advance(minute)
    .then(() => plant.database.models.estimates.findAll({ order: [['t', 'DESC']], limit: 1 }));
  expect(next[0]).toMatchObject({ baseSampleId: outcome.sample.id, offset: effect!.after.offset });
});

it('changes nothing when the same result comes again, and refuses a different one for the same time', async () => {
  const plant = await plantWithPerson();
  const draft = aResult(plant.clock.t - 2 * hour);
  const first = await plant.enter(draft);
  const again = await plant.enter(draft);
  expect([again.alreadyThere, again.sample.id]).toEqual([true, first.sample.id]);
  const count = await plant.database.models.samples.count();
  await expect(plant.enter(aResult(draft.drawnAt, heavier(usual, 2)))).rejects.toMatchObject({ status: 409 });
  expect(await plant.database.models.samples.count()).toBe(count);
});

it.each<[string, (draft: NewSample, now: number) => NewSample, string]>([
  [
    'a sum of 95 %',
    (draft) => ({
      ...draft,
      fractions: draft.fractions.map((one) =>
        one.id === 'propane' ? { ...one, fraction: one.fraction - 0.05 } : one,
      ),
    }),
    '95 %',
  ],
  ['a time to come', (draft, now) => ({ ...draft, drawnAt: now + hour, receivedAt: now + hour }), 'future'],
  [
    'a result received before it was drawn',
    (draft) => ({ ...draft, receivedAt: draft.drawnAt - minute }),
    'before the sample was drawn',
  ],
  [
    'a component left out',
    (draft) => ({ ...draft, fractions: draft.fractions.filter((one) => one.id !== 'n-pentane') }),
    'n-pentane is missing',
  ],
  [
    'a component nobody knows',
    (draft) => ({ ...draft, fractions: [...draft.fractions, { id: 'unobtainium', fraction: 0 }] }),
    'unobtainium',
  ],
  [
    'a component given twice',
    (draft) => ({ ...draft, fractions: [...draft.fractions, { id: 'ethane', fraction: 0 }] }),
    'twice',
  ],
])('refuses %s in words and keeps nothing of it', async (_, spoil, words) => {
  const plant = await plantWithPerson(1);
  const count = await plant.database.models.samples.count();
  const refused = plant.enter(spoil(aResult(plant.clock.t - 2 * hour), plant.clock.t));
  await expect(refused).rejects.toBeInstanceOf(Problem);
  await expect(refused).rejects.toMatchObject({
    status: 422,
    detail: expect.stringContaining(words) as string,
  });
  expect(await plant.database.models.samples.count()).toBe(count);
});

it('normalises a sum of 101 % and says so', async () => {
  const plant = await plantWithPerson(1);
  const draft = aResult(plant.clock.t - 2 * hour);
  const outcome = await plant.enter({
    ...draft,
    fractions: draft.fractions.map((one) => ({ ...one, fraction: 1.01 * one.fraction })),
  });
  expect(outcome.sample.reportedSum).toBeCloseTo(1.01, 12);
  expect(outcome.sample.fractions.reduce((sum, one) => sum + one.fraction, 0)).toBeCloseTo(1, 12);
  const [, entered] = await plant.database.models.journalEntries.findAll({
    order: [['id', 'DESC']],
    limit: 2,
  });
  expect(entered!.reason).toContain('101 % and are normalised');
});

it('holds a result far beyond the gate: nothing moves, and it says by how much', async () => {
  const plant = await plantWithPerson();
  const drawnAt = plant.clock.t - 2 * hour;
  const outcome = await plant.enter(aResult(drawnAt, heavier(usual, 10)));
  expect(outcome.sample).toMatchObject({
    state: 'held',
    stateReason: expect.stringMatching(/Held: [\d.]+ σ above/) as string,
  });
  expect(outcome.effects[0]!.after).toEqual(outcome.effects[0]!.before);
  expect(outcome.sample.corrections[0]).toMatchObject({ gain: 0, decision: 'held' });
});

it('ends, after a late result, where it would be had the results come in order; what was shown stays', async () => {
  const [inOrder, late] = [await plantWithPerson(), await plantWithPerson()];
  const early = inOrder.clock.t - 9 * hour;
  const recent = inOrder.clock.t - 2 * hour;
  const [first, second] = [
    aResult(early, await inOrder.truthAt(early)),
    aResult(recent, heavier(await inOrder.truthAt(recent), 1.1)),
  ];
  await inOrder.enter(first);
  await inOrder.enter(second);
  const shown = await late.database.models.estimates.findAll({ order: [['t', 'ASC']], raw: true });
  await late.enter(second);
  await late.enter(first);
  const offsetOf = async ({ sensors }: typeof late) =>
    (await sensors.present('depropaniser-overhead')).offset;
  expect(Math.abs((await offsetOf(late)) - (await offsetOf(inOrder)))).toBeLessThanOrEqual(1e-12);
  expect(await late.database.models.estimates.findAll({ order: [['t', 'ASC']], raw: true })).toEqual(shown);
});

it('lets a result wait whose tags have not been collected, and takes it in the cycle that brings them', async () => {
  const plant = await plantWithPerson();
  // The historian was away for an hour: the sample was drawn meanwhile.
  plant.clock.t += hour;
  plant.historian.now = plant.clock.t;
  const outcome = await plant.enter(
    aResult(plant.clock.t - 20 * minute, await plant.truthAt(plant.clock.t - 20 * minute), {
      receivedAt: plant.clock.t,
    }),
  );
  expect(outcome.sample).toMatchObject({ state: 'pending', corrections: [] });
  await plant.collector.runCycle();
  expect(await plant.samples.byId(outcome.sample.id)).toMatchObject({ state: 'used' });
});

it('lists the newest first, page by page, by tower and state', async () => {
  const plant = await plantWithPerson(4);
  await plant.enter(aResult(plant.clock.t - 2 * hour, heavier(usual, 10)));
  const query = (change: object) => samplesQuery.parse({ limit: 3, ...change });
  const seen: number[] = [];
  let cursor: string | null | undefined;
  do {
    const page = await plant.samples.list(query(cursor ? { cursor } : {}));
    seen.push(...page.items.map((item) => item.drawnAt));
    cursor = page.next;
  } while (cursor);
  expect(seen).toHaveLength(await plant.database.models.samples.count());
  expect(seen).toEqual([...seen].sort((a, b) => b - a));
  const held = await plant.samples.list(query({ state: 'held' }));
  expect(held.items[0]).toMatchObject({ drawnAt: plant.clock.t - 2 * hour });
  expect(new Set(held.items.map((item) => item.state))).toEqual(new Set(['held']));
  expect((await plant.samples.list(query({ towerId: 'nowhere' }))).items).toEqual([]);
  await expect(plant.samples.list(query({ cursor: 'x' }))).rejects.toMatchObject({ status: 400 });
});
