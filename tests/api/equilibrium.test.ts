import { expect, it } from 'vitest';
import type { ProblemDocument } from '@shared/api/common';
import {
  componentList,
  equilibriumAnswer,
  inferenceAnswer,
  vapourPressureAnswer,
} from '@shared/api/equilibrium';
import { startTestApp } from './support/test-app';

/** Mixture m002 of the library cases (thermo 0.6.1, chemicals 1.5.2): a depropaniser's overhead. */
const components = [
  { id: 'ethane', fraction: 0.005 },
  { id: 'propane', fraction: 0.985 },
  { id: 'isobutane', fraction: 0.008 },
  { id: 'n-butane', fraction: 0.002 },
];

async function asker() {
  const app = await startTestApp();
  const operator = await app.signedIn('operator');
  return async <T = unknown>(path: string, body: object) =>
    operator.json<T>('POST', `/api/equilibrium/${path}`, body);
}

it.each([
  ['dew-point', { method: 'ideal', pressure: 1_550_000 }, { temperature: 319.179389053 }],
  ['dew-point', { method: 'ideal', temperature: 313.15 }, { pressure: 1_351_080.9305 }],
  ['bubble-point', { method: 'ideal', pressure: 1_550_000 }, { temperature: 318.175907734 }],
  ['bubble-point', { method: 'ideal', temperature: 313.15 }, { pressure: 1_382_883.55703 }],
  ['dew-point', { method: 'peng-robinson', pressure: 1_550_000 }, { temperature: 319.020724659 }],
  ['dew-point', { method: 'peng-robinson', temperature: 313.15 }, { pressure: 1_354_482.67224 }],
  ['bubble-point', { method: 'peng-robinson', pressure: 1_550_000 }, { temperature: 318.352186298 }],
  ['bubble-point', { method: 'peng-robinson', temperature: 313.15 }, { pressure: 1_376_840.19558 }],
] as const)('answers a %s for %o as the libraries do', async (path, question, expected) => {
  const ask = await asker();
  const { status, body } = await ask(path, { ...question, components });
  expect(status).toBe(200);
  const answer = equilibriumAnswer.parse(body);
  for (const [name, value] of Object.entries(expected))
    expect(Math.abs(answer[name as 'temperature' | 'pressure'] / value - 1)).toBeLessThan(1e-9);
  for (const phase of [answer.vapour, answer.liquid]) {
    expect(phase.map(({ id }) => id)).toEqual(components.map(({ id }) => id));
    expect(phase.reduce((sum, { fraction }) => sum + fraction, 0)).toBeCloseTo(1, 12);
  }
  expect(answer.slope).toBeGreaterThan(2e-5);
});

it('splits a feed between its bubble and dew point', async () => {
  const ask = await asker();
  const { body } = await ask('flash', {
    method: 'peng-robinson',
    components,
    temperature: 318.653,
    pressure: 1_550_000,
  });
  expect(equilibriumAnswer.parse(body).vapourFraction).toBeCloseTo(0.451326171097, 6);
});

it('says which correlation it used, lets another be chosen, and warns above the critical temperature', async () => {
  const ask = await asker();
  const pressureOf = async (body: object) =>
    vapourPressureAnswer.parse((await ask('vapour-pressure', body)).body);
  expect(await pressureOf({ id: 'propane', temperature: 300 })).toMatchObject({
    correlation: 'propane/wagner25-vdi',
    inRange: true,
  });
  expect(
    await pressureOf({ id: 'propane', temperature: 300, correlation: 'propane/dippr101-perry8' }),
  ).toMatchObject({ correlation: 'propane/dippr101-perry8' });
  expect(await pressureOf({ id: 'ethane', temperature: 319 })).toMatchObject({
    correlation: 'ethane/dippr101-perry8',
    inRange: false,
  });
  const { body } = await ask('dew-point', { method: 'ideal', components, pressure: 1_550_000 });
  expect(equilibriumAnswer.parse(body).warnings).toEqual([
    expect.objectContaining({ code: 'correlation-out-of-range', component: 'ethane' }),
  ]);
});

it('infers the heavy group from a dew point, and the offset is added to the temperature', async () => {
  const ask = await asker();
  const base = components.map((one) => ({ ...one, group: one.id === 'isobutane' ? 'heavy' : 'light' }));
  const question = { relation: 'dew', method: 'ideal', base, pressure: 1_605_600 };
  const straight = inferenceAnswer.parse(
    (await ask('inference', { ...question, temperature: 320.54554606270585 })).body,
  );
  // Library case m002-ideal-infer-1.
  expect(straight.groupFraction).toBeCloseTo(0.0048, 9);
  const shifted = inferenceAnswer.parse(
    (await ask('inference', { ...question, temperature: 320.04554606270585, offset: 0.5 })).body,
  );
  expect(shifted.groupFraction).toBeCloseTo(straight.groupFraction, 12);
  expect(shifted.clamped).toBe(false);
});

it.each([
  [
    'an unknown component',
    'dew-point',
    { method: 'ideal', components: [{ id: 'unobtainium', fraction: 1 }], pressure: 1e5 },
    400,
    'not a component',
  ],
  [
    'fractions that are no composition',
    'dew-point',
    { method: 'ideal', components: [{ id: 'propane', fraction: 0.7 }], pressure: 1e5 },
    400,
    'sum to 0.7',
  ],
  [
    'temperature and pressure at once',
    'bubble-point',
    { method: 'ideal', components, pressure: 1e5, temperature: 300 },
    400,
    'either',
  ],
  [
    'a correlation of another component',
    'dew-point',
    { method: 'ideal', components, pressure: 1e5, correlations: { propane: 'n-butane/wagner25-vdi' } },
    400,
    'not a vapour pressure correlation of propane',
  ],
  [
    'a pressure above the critical one',
    'bubble-point',
    { method: 'peng-robinson', components: [{ id: 'propane', fraction: 1 }], pressure: 6e6 },
    422,
    'critical',
  ],
  ['a method nobody has', 'dew-point', { method: 'guess', components, pressure: 1e5 }, 400, 'method'],
] as const)('refuses %s with a problem that says what to do', async (_, path, question, status, words) => {
  const ask = await asker();
  const answer = await ask<ProblemDocument>(path, question);
  expect([answer.status, answer.body.status]).toEqual([status, status]);
  expect(answer.body.detail).toContain(words);
});

it('lists the components with their sources', async () => {
  const app = await startTestApp();
  const operator = await app.signedIn('operator');
  const list = componentList.parse((await operator.json('GET', '/api/equilibrium/components')).body);
  expect(list).toHaveLength(35);
  for (const component of list) {
    expect(component.criticalSource.length).toBeGreaterThan(10);
    expect(component.correlations.length).toBeGreaterThan(0);
  }
});
