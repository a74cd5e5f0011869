import { createInference } from '@shared/inference/inference';
import { flash, type Mixture } from '@shared/vle/equilibrium';
import {
  attempt,
  distinctWarnings,
  inferredProduct,
  mixtureAt,
  phaseLines,
  saturationPoint,
  andThen,
} from './desk-answer';

const mixture: Mixture = {
  method: 'peng-robinson',
  components: [
    { id: 'ethane', fraction: 0.012 },
    { id: 'propane', fraction: 0.966 },
    { id: 'n-butane', fraction: 0.022 },
  ],
};
const groups = ['light', 'light', 'heavy'] as const;
const inferenceOf = (method: Mixture['method'], relation: 'dew' | 'bubble' = 'dew') =>
  createInference({
    relation,
    method,
    base: mixture.components.map((component, i) => ({ ...component, group: groups[i]! })),
  });
const sum = (numbers: readonly (number | null)[]) =>
  numbers.reduce<number>((total, x) => total + (x ?? 0), 0);

describe('the table of phases', () => {
  it('has partial pressures that sum to the pressure, and y = K·x in every line', () => {
    const bubble = saturationPoint('bubble', mixture, { pressure: 1.7e6 });
    const dew = saturationPoint('dew', mixture, { pressure: 1.7e6 });
    const between = flash(mixture, {
      temperature: (bubble.temperature + dew.temperature) / 2,
      pressure: 1.7e6,
    });
    expect(between.vapourFraction).toBeGreaterThan(0);
    expect(between.vapourFraction).toBeLessThan(1);
    const lines = phaseLines(mixture, between);
    expect(sum(lines.map((line) => line.partialPressure))).toBeCloseTo(1.7e6, 2);
    for (const line of lines) {
      expect(line.vapour! / (line.kValue! * line.liquid!)).toBeCloseTo(1, 9);
      const both = between.vapourFraction * line.vapour! + (1 - between.vapourFraction) * line.liquid!;
      expect(both / line.feed).toBeCloseTo(1, 9);
    }
  });

  it('has no vapour, K-values or partial pressures where all is liquid', () => {
    const lines = phaseLines(mixture, flash(mixture, { temperature: 280, pressure: 1.7e6 }));
    expect(lines.map(({ vapour, kValue, partialPressure }) => [vapour, kValue, partialPressure])).toEqual(
      Array(3).fill([null, null, null]),
    );
    expect(sum(lines.map((line) => line.liquid))).toBeCloseTo(1, 12);
  });
});

describe('the inferred product', () => {
  it.each(['ideal', 'peng-robinson'] as const)(
    'by %s is the target at the temperature, and at the pressure, that the desk gives for it',
    (method) => {
      const inference = inferenceOf(method);
      const wanted = mixtureAt(inference, 0.031);
      expect(sum(wanted.components.map(({ fraction }) => fraction))).toBeCloseTo(1, 12);
      const atPressure = saturationPoint('dew', wanted, { pressure: 1.7e6 });
      expect(inference.infer(atPressure.temperature, 1.7e6).groupFraction).toBeCloseTo(0.031, 6);
      const atTemperature = saturationPoint('dew', wanted, { temperature: 323 });
      expect(inference.infer(323, atTemperature.pressure).groupFraction).toBeCloseTo(0.031, 6);
    },
  );

  it('is uncertain by what the instruments’ tolerances move it, taken together as independent', () => {
    const inference = inferenceOf('peng-robinson');
    const { temperature } = saturationPoint('dew', mixture, { pressure: 1.7e6 });
    const product = inferredProduct(inference, temperature, 1.7e6, {
      thermometer: 'A',
      pressureTolerance: 2000,
    });
    // Central differences instead of the sensitivities the figure was made with.
    const h = (T: number, P: number) => inference.infer(T, P).groupFraction;
    const slopeT = (h(temperature + 0.01, 1.7e6) - h(temperature - 0.01, 1.7e6)) / 0.02;
    const slopeP = (h(temperature, 1.7e6 + 100) - h(temperature, 1.7e6 - 100)) / 200;
    const toleranceT = 0.15 + 0.002 * (temperature - 273.15);
    expect(product.byThermometer).toBeCloseTo(Math.abs(slopeT * toleranceT) / Math.sqrt(3), 5);
    expect(product.byPressure).toBeCloseTo(Math.abs(slopeP * 2000) / Math.sqrt(3), 5);
    expect(product.uncertainty ** 2).toBeCloseTo(product.byThermometer ** 2 + product.byPressure ** 2, 12);
  });
});

describe('a question that has no answer', () => {
  it('is refused in words, and stays so for what would follow from it', () => {
    const beyond = attempt(() => saturationPoint('dew', mixture, { pressure: 20e6 }));
    expect(beyond.kind).toBe('refused');
    expect(beyond).toHaveProperty('words', expect.stringContaining('Choose a lower pressure'));
    expect(andThen(beyond, () => 1)).toBe(beyond);
  });

  it('that is a bug is thrown, not shown as if the person had asked wrongly', () => {
    expect(() =>
      attempt(() => {
        throw new TypeError('a bug');
      }),
    ).toThrow('a bug');
  });
});

describe('warnings', () => {
  it('of several results stand once each', () => {
    const hot: Mixture = { ...mixture, method: 'ideal' };
    const results = [280, 330, 340].map((temperature) =>
      attempt(() => saturationPoint('bubble', hot, { temperature })),
    );
    const warnings = distinctWarnings(results);
    expect(warnings.map(({ component }) => component)).toEqual(['ethane']);
  });
});
