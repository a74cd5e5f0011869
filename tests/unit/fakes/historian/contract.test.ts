import request from 'supertest';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { problem } from '@shared/api/common';
import {
  historianLatest,
  historianRaw,
  type HistorianRaw,
  historianState,
  historianTagPage,
  historianWritten,
  qualityOfStatus,
  statusCodes,
  truth,
} from '@shared/api/historian';
import { createHistorianFake, type HistorianFake } from '../../../../fakes/historian/historian-fake';

// Simulating and starting processes takes its time where others work too.
vi.setConfig({ testTimeout: 60_000 });

const minute = 60_000;
const hour = 60 * minute;
const startAt = Date.UTC(2026, 8, 1);

let now = startAt + 3 * hour + 30_000;
// One plant for all: each takes a sixth of a second to run in, and what lies behind `now` is not seen.
const shared = aFake();
let fake: HistorianFake;

beforeEach(() => {
  now = startAt + 3 * hour + 30_000;
  fake = shared;
});

function aFake(changes: object = {}): HistorianFake {
  return createHistorianFake({
    seed: 1,
    startAt,
    now: () => now,
    setNow: (wanted) => (now = wanted),
    token: 'plant',
    controlToken: 'wizard',
    ...changes,
  });
}

const authorized = (call: request.Test, token = 'plant') => call.set('authorization', `Bearer ${token}`);
const get = (path: string, token?: string) => authorized(request(fake.app).get(path), token);
const post = (path: string, body: object | string, token?: string) =>
  authorized(request(fake.app).post(path), token).type('json').send(body);

const latest = async (...tags: string[]) =>
  historianLatest.parse((await post('/v1/latest', { tags }).expect(200)).body).values;
const raw = async (question: object) =>
  historianRaw.parse((await post('/v1/raw', question).expect(200)).body);
const temperatures = async (question: object) =>
  (await raw({ tags: ['dp-overhead-temperature'], ...question })).series[0]!;

describe('the token', () => {
  it.each([undefined, 'Bearer', 'Bearer wrong', 'Basic plant', 'plant', 'Bearer plant '.repeat(2)])(
    'is asked for: "%s" is answered 401 with what to do',
    async (header) => {
      const call = request(fake.app).get('/v1/tags');
      const answer = await (header === undefined ? call : call.set('authorization', header));
      expect(answer.status).toBe(401);
      expect(answer.headers['content-type']).toContain('application/problem+json');
      expect(answer.headers['www-authenticate']).toBe('Bearer');
      expect(problem.parse(answer.body).detail).toMatch(/token/);
    },
  );

  it('of the contract does not open control, nor the other way round', async () => {
    await get('/control/state').expect(401);
    await get('/v1/tags', 'wizard').expect(401);
    await get('/control/state', 'wizard').expect(200);
  });

  it('is not needed to see that the historian is up', async () => {
    await request(fake.app).get('/health').expect(200, { status: 'ok' });
  });
});

describe('the tag list', () => {
  it('names every tag once, by pages of any size', async () => {
    const all = historianTagPage.parse((await get('/v1/tags').expect(200)).body);
    expect(all.next).toBeNull();
    const names: string[] = [];
    let cursor: string | null = null;
    do {
      const query: string = cursor === null ? '' : `&cursor=${encodeURIComponent(cursor)}`;
      const page = historianTagPage.parse((await get(`/v1/tags?limit=5${query}`).expect(200)).body);
      expect(page.tags.length).toBeLessThanOrEqual(5);
      names.push(...page.tags.map(({ name }) => name));
      cursor = page.next;
    } while (cursor !== null);
    expect(names).toEqual(all.tags.map(({ name }) => name));
    expect(new Set(names).size).toBe(names.length);
    expect(names).toContain('dp-overhead-temperature');
  });

  it('searches in names and descriptions, in any case', async () => {
    const { tags } = historianTagPage.parse((await get('/v1/tags?search=REBOILER').expect(200)).body);
    expect(tags.map(({ name }) => name)).toEqual(['dp-reboiler-temperature']);
    expect(historianTagPage.parse((await get('/v1/tags?search=nothing').expect(200)).body).tags).toEqual([]);
  });

  it('states units, and which tags hold their value', async () => {
    const { tags } = historianTagPage.parse((await get('/v1/tags?search=temperature').expect(200)).body);
    expect(tags.every(({ unit }) => unit === '°C')).toBe(true);
    expect(tags.filter(({ stepped }) => stepped).map(({ name }) => name)).toEqual([
      'dp-tray-temperature-setpoint',
    ]);
  });
});

describe('the latest values', () => {
  it('are those of the last whole minute, and the last of the raw ones', async () => {
    const [value] = await latest('dp-overhead-temperature');
    expect(value).toMatchObject({ t: startAt + 3 * hour, status: statusCodes.Good });
    const series = await temperatures({ from: startAt, to: now });
    expect(value!.value).toBe(series.value.at(-1));
    now += minute;
    expect((await latest('dp-overhead-temperature'))[0]!.t).toBe(startAt + 3 * hour + minute);
  });

  it('come in the order asked, an unknown tag among them with its status', async () => {
    const values = await latest('dp-feed-flow', 'no-such-tag', 'dp-feed-flow');
    expect(values.map(({ tag }) => tag)).toEqual(['dp-feed-flow', 'no-such-tag', 'dp-feed-flow']);
    expect(values[1]).toEqual({ tag: 'no-such-tag', t: now, value: null, status: 0x80340000 });
    expect(values[2]).toEqual(values[0]);
    expect(qualityOfStatus(values[1]!.status)).toBe('Bad');
  });
});

describe('raw values', () => {
  it('include the start of the interval and exclude its end', async () => {
    const series = await temperatures({ from: startAt + minute, to: startAt + 4 * minute });
    expect(series.t).toEqual([1, 2, 3].map((k) => startAt + k * minute));
    const between = await temperatures({ from: startAt + minute + 1, to: startAt + 4 * minute + 1 });
    expect(between.t).toEqual([2, 3, 4].map((k) => startAt + k * minute));
    expect((await temperatures({ from: startAt, to: startAt })).t).toEqual([]);
  });

  it('begin with the history and end with the present, whatever is asked', async () => {
    const series = await temperatures({ from: 0, to: now + 10 * hour });
    expect(series.t[0]).toBe(startAt);
    expect(series.t.at(-1)).toBe(startAt + 3 * hour);
    expect(series.t).toHaveLength(181);
  });

  it.each([1, 7, 60, 181, 10_000])(
    'come once each and in order when read on by %i at a time',
    async (limit) => {
      const tags = [
        'dp-overhead-temperature',
        'no-such-tag',
        'dp-inferred-butanes',
        'dp-tray-temperature-setpoint',
      ];
      await post('/v1/write', {
        values: [5, 1, 3].map((k) => ({ tag: 'dp-inferred-butanes', t: startAt + k, value: k, status: 0 })),
      }).expect(200);
      const question = { tags, from: startAt, to: now, limit };
      const whole = await raw({ ...question, limit: undefined });
      const joined = tags.map((tag, i) => ({
        tag,
        result: whole.series[i]!.result,
        t: [],
        value: [],
        status: [],
      }));
      let page: HistorianRaw;
      let continuation: string | null = null;
      do {
        page = await raw({ ...question, continuation });
        page.series.forEach((series, i) => {
          expect(series.t.length).toBeLessThanOrEqual(limit);
          for (const column of ['t', 'value', 'status'] as const)
            (joined[i]![column] as (number | null)[]).push(...series[column]);
        });
        continuation = page.continuation;
      } while (continuation !== null);
      expect(joined).toEqual(whole.series);
      expect(whole.series.map(({ t }) => t.length)).toEqual([181, 0, 3, 181]);
      expect(whole.series[2]!.value).toEqual([1, 3, 5]);
      expect(whole.series[1]!.result).toBe(statusCodes.Bad_NodeIdUnknown);
    },
  );

  it('go on by the same continuation after a restart, since it holds all there is to know', async () => {
    const question = { tags: ['dp-feed-flow'], from: startAt, to: now, limit: 100 };
    const { continuation } = await raw(question);
    fake = aFake();
    const { series } = await raw({ ...question, continuation });
    expect(series[0]!.t[0]).toBe(startAt + 100 * minute);
  });

  it.each(['nonsense', Buffer.from('{"question":"x","next":[1]}').toString('base64url')])(
    'refuse the continuation "%s"',
    async (continuation) => {
      const answer = await post('/v1/raw', { tags: ['dp-feed-flow'], from: startAt, to: now, continuation });
      expect(answer.status).toBe(400);
      expect(problem.parse(answer.body).detail).toMatch(/continuation/);
    },
  );

  it('refuse a continuation of another question', async () => {
    const question = { tags: ['dp-feed-flow'], from: startAt, to: now, limit: 10 };
    const { continuation } = await raw(question);
    await post('/v1/raw', { ...question, to: now + 1, continuation }).expect(400);
  });

  it.each([
    ['{"tags":', /cannot be read/],
    ['[]', /body/],
    [{ tags: [], from: startAt, to: startAt }, /tags/],
    [{ tags: ['a'], from: 5, to: 4 }, /must not be before from/],
    [{ tags: ['a'], from: '5', to: 6 }, /from/],
    [{ tags: ['a'], from: 5, to: 6, limit: 10_001 }, /limit/],
    [{ tags: Array.from({ length: 1001 }, (_, i) => `t${i}`), from: 5, to: 6 }, /tags/],
    [{ tags: ['a'], from: 1.5, to: 6 }, /from/],
  ])('refuse %j and say why', async (body, why) => {
    const answer = await post('/v1/raw', body);
    expect(answer.status).toBe(400);
    expect(answer.headers['content-type']).toContain('application/problem+json');
    expect(problem.parse(answer.body).detail).toMatch(why);
  });

  it('refuse a body that is not called JSON, and one beyond all measure', async () => {
    const text = await authorized(request(fake.app).post('/v1/raw')).type('text/plain').send('{}');
    expect(text.status).toBe(400);
    expect(problem.parse(text.body).detail).toMatch(/content-type application\/json/);
    const huge = await post('/v1/raw', { tags: ['x'.repeat(5_000_000)], from: 0, to: 1 });
    expect(huge.status).toBe(413);
    expect(problem.parse(huge.body).detail).toMatch(/too large/);
  });
});

describe('writing', () => {
  beforeEach(() => {
    fake = aFake();
  });

  const write = async (...values: object[]) =>
    historianWritten
      .parse((await post('/v1/write', { values }).expect(200)).body)
      .results.map(({ status }) => status);

  it('takes values of writable tags only, each with its own result', async () => {
    expect(
      await write(
        { tag: 'dp-inferred-butanes', t: now, value: 1.4, status: 0 },
        { tag: 'dp-overhead-temperature', t: now, value: 1, status: 0 },
        { tag: 'no-such-tag', t: now, value: 1, status: 0 },
      ),
    ).toEqual([statusCodes.Good, statusCodes.Bad_NotWritable, statusCodes.Bad_NodeIdUnknown]);
    expect(await latest('dp-inferred-butanes')).toEqual([
      { tag: 'dp-inferred-butanes', t: now, value: 1.4, status: 0 },
    ]);
    expect((await latest('dp-overhead-temperature'))[0]!.value).toBeGreaterThan(40);
  });

  it('may be repeated, and corrected, for the same time', async () => {
    const value = { tag: 'dp-inferred-butanes', t: now - 5, value: 1.4, status: 0 };
    await write(value);
    await write(value, { ...value, value: null, status: statusCodes.Bad_NoData });
    const { series } = await raw({ tags: [value.tag], from: 0, to: now });
    expect(series[0]).toMatchObject({ t: [now - 5], value: [null], status: [statusCodes.Bad_NoData] });
  });

  it('keeps what is later than now to itself until then', async () => {
    await write({ tag: 'dp-inferred-butanes', t: now + hour, value: 2, status: 0 });
    expect((await latest('dp-inferred-butanes'))[0]!.status).toBe(statusCodes.Bad_NoData);
    now += hour;
    expect((await latest('dp-inferred-butanes'))[0]!.value).toBe(2);
  });

  it('refuses what JSON has no number for', async () => {
    await post('/v1/write', '{"values":[{"tag":"dp-inferred-butanes","t":1,"value":NaN,"status":0}]}').expect(
      400,
    );
    await post(
      '/v1/write',
      '{"values":[{"tag":"dp-inferred-butanes","t":1,"value":1e999,"status":0}]}',
    ).expect(400);
  });
});

describe('control', () => {
  it('tells seed, clock and towers', async () => {
    expect(historianState.parse((await get('/control/state', 'wizard').expect(200)).body)).toEqual({
      now,
      clock: 'manual',
      seed: 1,
      startAt,
      towers: [
        {
          id: 'depropaniser',
          name: 'Depropaniser',
          components: ['ethane', 'propane', 'isobutane', 'n-butane', 'isopentane', 'n-pentane'],
        },
      ],
    });
  });

  it('tells the truth at the sample points, up to now', async () => {
    const query = `tower=depropaniser&from=${startAt + 30_000}&to=${now + hour}&step=${hour}`;
    const answer = truth.parse((await get(`/control/truth?${query}`, 'wizard').expect(200)).body);
    expect(answer.t).toEqual([0, 1, 2].map((k) => startAt + minute + k * hour));
    for (const point of ['overhead', 'rundown', 'bottoms'] as const)
      answer.t.forEach((_, i) => {
        const fractions = answer.components.map((id) => answer[point][id]![i]!);
        expect(fractions.reduce((sum, fraction) => sum + fraction, 0)).toBeCloseTo(1, 12);
      });
    expect(answer.overhead['propane']![0]).toBeGreaterThan(0.9);
    expect(answer.rundown['propane']![0]).toBeGreaterThan(0.9);
    expect(answer.bottoms['propane']![0]).toBeLessThan(0.1);
  });

  it.each([
    ['tower=nowhere&from=0&to=1', 404],
    [`tower=depropaniser&from=0&to=${startAt}`, 400],
    ['tower=depropaniser&from=0&to=1&step=90000', 400],
    ['tower=depropaniser', 400],
  ])('answers truth?%s with %i', async (query, status) => {
    const answer = await get(`/control/truth?${query}`, 'wizard');
    expect(answer.status).toBe(status);
    expect(problem.parse(answer.body).detail.length).toBeGreaterThan(20);
  });

  it('moves a manual clock forward, never back, and the plant goes on', async () => {
    await post('/control/clock', { now: now + 2 * hour }, 'wizard').expect(200);
    expect((await latest('dp-feed-flow'))[0]!.t).toBe(startAt + 5 * hour);
    const answer = await post('/control/clock', { now: startAt }, 'wizard');
    expect(answer.status).toBe(409);
    expect(problem.parse(answer.body).detail).toMatch(/forward/);
  });

  it('does not move real time', async () => {
    fake = aFake({ setNow: undefined });
    const answer = await post('/control/clock', { now: now + hour }, 'wizard');
    expect(answer.status).toBe(409);
    expect(historianState.parse((await get('/control/state', 'wizard')).body).clock).toBe('real');
  });

  it('is not there unless it was given a token', async () => {
    fake = aFake({ controlToken: undefined });
    await get('/control/state', 'wizard').expect(404);
    await get('/control/truth', 'undefined').expect(404);
  });
});

describe('status codes', () => {
  it.each([
    [0x00000000, 'Good'],
    [0x00dc0000, 'Good'],
    [0x40900000, 'Uncertain'],
    [0x80310000, 'Bad'],
    [0xffffffff, 'Bad'],
  ])('%i is %s by its two highest bits', (code, quality) => {
    expect(qualityOfStatus(code)).toBe(quality);
  });
});
