import * as fc from 'fast-check';
import { afterAll, describe, expect, it } from 'vitest';
import { createInference } from '@shared/inference/inference';
import { components } from '@shared/vle/components';
import {
  bubblePoint,
  dewPoint,
  flash,
  type Amount,
  type EquilibriumResult,
  type Method,
  type Mixture,
} from '@shared/vle/equilibrium';
import { EquilibriumError } from '@shared/vle/errors';
import { PengRobinson } from '@shared/vle/peng-robinson';

/** Cases of each function and method. */
const runs = 10_000;
const seed = 20261201;

const answered = new Map<string, { answered: number; refused: Map<string, number> }>();
afterAll(() => {
  for (const [name, count] of answered)
    console.log(
      `figure: fuzz: ${name}: ${count.answered} answered, ${[...count.refused].map(([code, n]) => `${n} ${code}`).join(', ') || 'none refused'}`,
    );
});

/** The answer, or undefined where the question was refused in the way it may be; anything else thrown is a fault. */
function attempt<T>(name: string, question: () => T): T | undefined {
  const count = answered.get(name) ?? { answered: 0, refused: new Map<string, number>() };
  answered.set(name, count);
  try {
    const answer = question();
    count.answered++;
    return answer;
  } catch (error) {
    if (!(error instanceof EquilibriumError)) throw error;
    count.refused.set(error.code, (count.refused.get(error.code) ?? 0) + 1);
    return undefined;
  }
}

/** Any slate of one to six components, traces among them. */
const slate = fc
  .uniqueArray(fc.constantFrom(...components.map((component) => component.id)), {
    minLength: 1,
    maxLength: 6,
  })
  .chain((ids) =>
    fc.tuple(
      ...ids.map((id) =>
        fc
          .oneof(
            { weight: 5, arbitrary: fc.double({ min: 0.001, max: 1, noNaN: true }) },
            { weight: 1, arbitrary: fc.constantFrom(1e-12, 1e-7, 1e-4) },
          )
          .map((amount) => ({ id, amount })),
      ),
    ),
  )
  .map((parts): Amount[] => {
    const sum = parts.reduce((total, part) => total + part.amount, 0);
    return parts.map(({ id, amount }) => ({ id, fraction: amount / sum }));
  });
/**
 * Hydrocarbons only: with water, alcohols, or hydrogen sulphide in the cold, two liquids form, and the bubble point of one
 * liquid that would part in two is no equilibrium.
 */
const hydrocarbons = new Set(
  components.filter(({ formula }) => /^C\d*H\d+$/.test(formula)).map(({ id }) => id),
);
const oneLiquid = slate.filter((amounts) => amounts.every(({ id }) => hydrocarbons.has(id)));
const temperature = fc.double({ min: 120, max: 620, noNaN: true });
const pressure = fc.double({ min: Math.log(1e3), max: Math.log(2e7), noNaN: true }).map(Math.exp);

function expectComposition(part: readonly Amount[]): void {
  if (part.length === 0) return;
  const sum = part.reduce((total, { fraction }) => total + fraction, 0);
  if (!(Math.abs(sum - 1) < 1e-9) || part.some(({ fraction }) => !(fraction >= 0)))
    throw new Error(`no composition: ${JSON.stringify(part)}`);
}

function expectSound(result: EquilibriumResult): void {
  for (const value of [result.temperature, result.pressure, result.vapourFraction])
    if (!Number.isFinite(value)) throw new Error(`not a number in ${JSON.stringify(result)}`);
  expectComposition(result.vapour);
  expectComposition(result.liquid);
}

/** Fugacities of every component that is there agree to 1e-8. */
function expectEqualFugacities(method: Method, result: EquilibriumResult): void {
  if (method !== 'peng-robinson' || result.vapour.length === 0 || result.liquid.length === 0) return;
  const pr = new PengRobinson(result.vapour.map(({ id }) => id));
  const [liquid, vapour] = [pr.newState(), pr.newState()];
  pr.evaluate(
    result.temperature,
    result.pressure,
    result.liquid.map(({ fraction }) => fraction),
    'liquid',
    liquid,
  );
  pr.evaluate(
    result.temperature,
    result.pressure,
    result.vapour.map(({ fraction }) => fraction),
    'vapour',
    vapour,
  );
  result.vapour.forEach(({ fraction: y }, i) => {
    const x = result.liquid[i]!.fraction;
    if (x === 0 || y === 0) return;
    const off = Math.abs(Math.log(y / x) + vapour.lnPhi[i]! - liquid.lnPhi[i]!);
    if (!(off < 1e-8))
      throw new Error(`fugacities of ${result.vapour[i]!.id} differ by ${off} in ${JSON.stringify(result)}`);
  });
}

/** Answers to the same question with its components in another order, or given with a sum a little off 1. */
function expectSame(a: EquilibriumResult, b: EquilibriumResult, within: number): void {
  if (Math.abs(a.temperature / b.temperature - 1) > within || Math.abs(a.pressure / b.pressure - 1) > within)
    throw new Error(
      `the order or scale of the components matters: ${JSON.stringify(a)} and ${JSON.stringify(b)}`,
    );
}

const scaled = (amounts: readonly Amount[]) =>
  amounts.map(({ id, fraction }) => ({ id, fraction: fraction * (1 + 5e-7) }));

const lines = { bubble: bubblePoint, dew: dewPoint } as const;

describe.each(['ideal', 'peng-robinson'] as const)('%s: whatever a person can type', (method) => {
  describe.each(['bubble', 'dew'] as const)('%s point', (kind) => {
    const solve = lines[kind];
    it.each(['temperature', 'pressure'] as const)(
      'at a given %s is an answer or a reason',
      { timeout: 120_000 },
      (held) => {
        const name = `${method} ${kind} point at ${held}`;
        fc.assert(
          fc.property(slate, held === 'temperature' ? temperature : pressure, (amounts, value) => {
            const mixture: Mixture = { method, components: amounts };
            const at = held === 'temperature' ? { temperature: value } : { pressure: value };
            const result = attempt(name, () => solve(mixture, at));
            if (!result) return;
            expectSound(result);
            expectEqualFugacities(method, result);
            const turned = attempt(`${name}, turned round`, () =>
              solve({ method, components: [...scaled(amounts)].reverse() }, at),
            );
            if (turned) expectSame(result, turned, 1e-8);
          }),
          { numRuns: runs, seed },
        );
      },
    );
  });

  it('a flash is an answer or a reason', { timeout: 120_000 }, () => {
    fc.assert(
      fc.property(slate, temperature, pressure, (amounts, T, P) => {
        const result = attempt(`${method} flash`, () =>
          flash({ method, components: amounts }, { temperature: T, pressure: P }),
        );
        if (!result) return;
        expectSound(result);
        if (result.vapourFraction > 0 && result.vapourFraction < 1) {
          expectEqualFugacities(method, result);
          amounts.forEach(({ fraction }, i) => {
            const back =
              result.vapourFraction * result.vapour[i]!.fraction +
              (1 - result.vapourFraction) * result.liquid[i]!.fraction;
            if (Math.abs(back - fraction) > 1e-9)
              throw new Error(`the split does not close for ${amounts[i]!.id}`);
          });
        }
      }),
      { numRuns: runs, seed },
    );
  });

  it(
    'the dew temperature is never below the bubble temperature at one pressure',
    { timeout: 120_000 },
    () => {
      fc.assert(
        fc.property(oneLiquid, pressure, (amounts, P) => {
          const bubble = attempt(`${method} bubble beside dew`, () =>
            bubblePoint({ method, components: amounts }, { pressure: P }),
          );
          const dew = attempt(`${method} dew beside bubble`, () =>
            dewPoint({ method, components: amounts }, { pressure: P }),
          );
          if (bubble && dew && dew.temperature < bubble.temperature * (1 - 1e-9))
            throw new Error(`dew ${dew.temperature} K under bubble ${bubble.temperature} K`);
        }),
        { numRuns: runs, seed },
      );
    },
  );

  it('an inference is an answer or a reason', { timeout: 120_000 }, () => {
    fc.assert(
      fc.property(
        slate.filter((amounts) => amounts.length >= 2),
        fc.constantFrom('dew' as const, 'bubble' as const),
        temperature,
        pressure,
        (amounts, relation, T, P) => {
          const base = amounts.map((amount, i) => ({
            ...amount,
            group: i === 0 ? ('heavy' as const) : ('light' as const),
          }));
          const result = attempt(`${method} inference`, () =>
            createInference({ relation, method, base }).infer(T, P),
          );
          if (!result) return;
          if (!(result.groupFraction >= 0 && result.groupFraction <= 1))
            throw new Error(`h is ${result.groupFraction}`);
          const sum = result.composition.reduce((total, fraction) => total + fraction, 0);
          if (!(Math.abs(sum - 1) < 1e-9)) throw new Error(`the composition sums to ${sum}`);
          for (const value of [result.sensitivity.temperature, result.sensitivity.pressure])
            if (Number.isNaN(value)) throw new Error('a sensitivity is not a number');
        },
      ),
      { numRuns: runs, seed },
    );
  });
});

it('the fuzz asks what can be answered: most cases are', () => {
  for (const [name, { answered: n, refused }] of answered) {
    const all = n + [...refused.values()].reduce((sum, count) => sum + count, 0);
    expect(n / all, name).toBeGreaterThan(0.3);
  }
});
