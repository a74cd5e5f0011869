import { readFileSync } from 'node:fs';
import { afterAll, describe, expect, it } from 'vitest';
import { createInference } from '@shared/inference/inference';
import { bubblePoint, dewPoint, flash, type Amount } from '@shared/vle/equilibrium';
import { correlationById, logPressure, vapourPressureOf } from '@shared/vle/vapour-pressure';
import { WorstDeviations } from './support/worst-deviations';

/**
 * Cases solved by general-purpose libraries: thermo 0.6.1 and chemicals 1.5.2 (each Peng-Robinson case a second time by a
 * separately written solver, agreeing to 1e-10), reference vapour pressures by CoolProp 8.0.1dev.
 */
interface Case {
  readonly id: string;
  readonly calc: string;
  readonly method: string;
  readonly component: string;
  readonly components: readonly string[];
  readonly z: readonly number[];
  readonly key: string;
  readonly ratio_of_others: readonly (number | null)[];
  readonly vapour_pressure_row: string;
  readonly vapour_pressure_rows?: readonly string[];
  readonly given: { readonly T_K: number; readonly P_Pa: number };
  readonly expected: Readonly<Record<string, number>> & {
    readonly x?: readonly number[];
    readonly y?: readonly number[];
  };
  readonly dT_dkey_K: number;
  readonly tolerance: Readonly<Record<string, number>>;
}

const { cases } = JSON.parse(readFileSync(new URL('./data/vle-check.json', import.meta.url), 'utf8')) as {
  cases: Case[];
};
const worst = new WorstDeviations();
afterAll(() => worst.print('thermo, chemicals, CoolProp'));

const of = (...calcs: string[]) =>
  cases.filter((check) => calcs.includes(check.calc)).map((check) => ({ name: check.id, check }));
const methodOf = (check: Case): 'ideal' | 'peng-robinson' =>
  check.method === 'PR' ? 'peng-robinson' : 'ideal';
const correlationsOf = (check: Case) =>
  check.vapour_pressure_rows &&
  Object.fromEntries(check.components.map((id, i) => [id, check.vapour_pressure_rows![i]!]));
const mixtureOf = (check: Case) => ({
  method: methodOf(check),
  components: check.components.map((id, i) => ({ id, fraction: check.z[i]! })),
  correlations: correlationsOf(check),
});

/** Fractions agree to 1e-5 absolute; the weakest case is a near-critical split whose printed digits carry 2e-6. */
function expectFractions(kind: string, got: readonly Amount[], expected: readonly number[]): void {
  const off = Math.max(...expected.map((value, i) => Math.abs(value - got[i]!.fraction)));
  worst.note(`${kind}, fractions (absolute)`, off);
  expect(off).toBeLessThanOrEqual(1e-5);
}

describe('saturation points solved by reference libraries', () => {
  it.each(of('dew_temperature', 'dew_pressure', 'bubble_temperature', 'bubble_pressure'))(
    '$name',
    ({ check }) => {
      const kind = `${check.calc} ${methodOf(check)}`;
      const solve = check.calc.startsWith('dew') ? dewPoint : bubblePoint;
      const isTemperature = check.calc.endsWith('temperature');
      const point = solve(
        mixtureOf(check),
        isTemperature ? { pressure: check.given.P_Pa } : { temperature: check.given.T_K },
      );
      const off = isTemperature
        ? Math.abs(point.temperature / check.expected['T_K']! - 1)
        : Math.abs(point.pressure / check.expected['P_Pa']! - 1);
      worst.note(`${kind} (relative)`, off);
      expect(off).toBeLessThanOrEqual(1e-9);
      expectFractions(
        kind,
        check.calc.startsWith('dew') ? point.liquid : point.vapour,
        check.expected.x ?? check.expected.y!,
      );
      const slope = check.expected['dT_dP_K_per_Pa'];
      if (slope !== undefined) {
        worst.note(`${kind}, slope (relative)`, Math.abs(point.slope / slope - 1));
        expect(Math.abs(point.slope / slope - 1)).toBeLessThanOrEqual(1e-6);
      }
    },
  );
});

describe('splits solved by reference libraries', () => {
  it.each(of('flash_pt'))('$name', ({ check }) => {
    const kind = `flash ${methodOf(check)}`;
    const result = flash(mixtureOf(check), { temperature: check.given.T_K, pressure: check.given.P_Pa });
    const off = Math.abs(result.vapourFraction - check.expected['vapour_fraction']!);
    worst.note(`${kind}, vapour fraction (absolute)`, off);
    expect(off).toBeLessThanOrEqual(1e-6);
    expectFractions(kind, result.liquid, check.expected.x!);
    expectFractions(kind, result.vapour, check.expected.y!);
  });
});

describe('the key inferred from a dew point, by reference libraries', () => {
  it.each(of('infer_key_from_dew_point'))('$name', ({ check }) => {
    const others = check.ratio_of_others.reduce<number>((sum, ratio) => sum + (ratio ?? 0), 0);
    const inference = createInference({
      relation: 'dew',
      method: methodOf(check),
      correlations: correlationsOf(check),
      base: check.components.map((id, i) => {
        const ratio = check.ratio_of_others[i];
        return id === check.key
          ? { id, fraction: 0.1, group: 'heavy' as const }
          : { id, fraction: (0.9 * ratio!) / others, group: 'light' as const };
      }),
    });
    const { groupFraction, sensitivity } = inference.infer(check.given.T_K, check.given.P_Pa);
    const off = Math.abs(groupFraction - check.expected['key_fraction']!);
    worst.note(`inference ${methodOf(check)} (absolute)`, off);
    expect(off).toBeLessThanOrEqual(1e-9);
    // The slope is printed to five digits.
    const slopeOff = Math.abs(1 / sensitivity.temperature / check.dT_dkey_K - 1);
    worst.note(`inference ${methodOf(check)}, slope (relative)`, slopeOff);
    expect(slopeOff).toBeLessThanOrEqual(1e-4);
  });
});

describe('vapour pressures', () => {
  it.each(of('vapour_pressure'))('the correlation evaluates as by chemicals: $name', ({ check }) => {
    const pressure = Math.exp(
      logPressure(correlationById(check.vapour_pressure_row, check.component), check.given.T_K).value,
    );
    const off = Math.abs(pressure / check.expected['P_Pa']! - 1);
    worst.note('correlation rows (relative)', off);
    expect(off).toBeLessThanOrEqual(1e-8);
  });
  it.each(of('vapour_pressure_accuracy'))(
    'the first choice lies by the reference equation: $name',
    ({ check }) => {
      const pressure = Math.exp(vapourPressureOf(check.component).at(check.given.T_K).value);
      const off = Math.abs(pressure / check.expected['P_Pa']! - 1);
      worst.note('first choice against reference equations (relative)', off);
      expect(off).toBeLessThanOrEqual(check.tolerance['P_Pa_rel']!);
    },
  );
});
