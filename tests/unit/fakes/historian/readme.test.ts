import { readFileSync } from 'node:fs';
import request from 'supertest';
import { describe, expect, it, vi } from 'vitest';
import { createHistorianFake } from '../../../../fakes/historian/historian-fake';

// Simulating and starting processes takes its time where others work too.
vi.setConfig({ testTimeout: 60_000 });

const readme = readFileSync(new URL('../../../../fakes/historian/README.md', import.meta.url), 'utf8');
const startAt = Date.UTC(2026, 8, 1);

/** Each request of the README with the answer printed under it. */
const examples = [...readme.matchAll(/```http\n(\w+) (\S+)\n([^`]*)```\s*```json\n([^`]*)```/g)].map(
  ([, method, path, body, answer]) => ({ method: method!, path: path!, body: body!.trim(), answer: answer! }),
);

describe('the README of the historian fake', () => {
  it('has an example of each call', () => {
    expect(examples.map(({ method, path }) => `${method} ${path.split('?')[0]}`)).toEqual([
      'GET /v1/tags',
      'POST /v1/latest',
      'POST /v1/raw',
      'POST /v1/raw',
      'POST /v1/write',
      'POST /v1/raw',
    ]);
  });

  // The numbers are a regression guard too: the same seed must give them on every machine.
  it.each(examples)('$method $path answers as printed', async ({ method, path, body, answer }) => {
    const { app } = createHistorianFake({
      seed: 1,
      startAt,
      now: () => startAt + 2 * 3_600_000 + 30_000,
      token: 'token',
    });
    const call = method === 'GET' ? request(app).get(path) : request(app).post(path);
    const sent = call.set('authorization', 'Bearer token');
    const { body: given } = (await (body ? sent.type('json').send(body) : sent)) as { body: unknown };
    expect(given).toEqual(JSON.parse(answer));
  });
});
