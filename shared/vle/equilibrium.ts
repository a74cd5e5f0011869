import { componentById } from './components';
import { EquilibriumError, type EquilibriumWarning } from './errors';
import { flashIdeal, flashPengRobinson, type Split } from './flash';
import { IdealMixture } from './ideal';
import { saturate } from './saturation';
import { SaturationLine } from './saturation-line';

export type Method = 'ideal' | 'peng-robinson';

export interface Amount {
  readonly id: string;
  readonly fraction: number;
}

/** A question's mixture: mole fractions of known components, each once, summing to 1. */
export interface Mixture {
  readonly method: Method;
  readonly components: readonly Amount[];
  /** Component id to vapour pressure row, for `ideal`. */
  readonly correlations?: Readonly<Record<string, string>>;
}

export interface EquilibriumResult {
  /** [K], [Pa absolute] */
  readonly temperature: number;
  readonly pressure: number;
  /** Mole fractions in the order asked; empty for a phase that is not there. */
  readonly vapour: readonly Amount[];
  readonly liquid: readonly Amount[];
  readonly vapourFraction: number;
  /** K_i = y_i/x_i in the order asked; empty in a single phase. */
  readonly kValues: readonly number[];
  readonly warnings: readonly EquilibriumWarning[];
}

export interface SaturationResult extends EquilibriumResult {
  /** dT/dP along the line at constant composition [K/Pa]. */
  readonly slope: number;
}

export type At =
  | { readonly temperature: number; readonly pressure?: undefined }
  | { readonly pressure: number; readonly temperature?: undefined };

/** How far a sum of fractions may be from 1; beyond it the numbers are not a composition. */
const sumTolerance = 1e-6;

/** Checks a mixture and scales its fractions to sum to 1 exactly. */
export function normalised(amounts: readonly Amount[]): Amount[] {
  if (amounts.length === 0) throw new EquilibriumError('not-a-composition', 'Give at least one component.');
  const seen = new Set<string>();
  let sum = 0;
  for (const { id, fraction } of amounts) {
    componentById(id);
    if (seen.has(id))
      throw new EquilibriumError('not-a-composition', `${id} is listed twice; give each component once.`);
    seen.add(id);
    if (!(fraction >= 0) || !(fraction <= 1 + sumTolerance))
      throw new EquilibriumError(
        'not-a-composition',
        `The fraction of ${id} is ${fraction}; it must lie between 0 and 1.`,
      );
    sum += fraction;
  }
  if (Math.abs(sum - 1) > sumTolerance)
    throw new EquilibriumError(
      'not-a-composition',
      `The fractions sum to ${Number(sum.toPrecision(8))}; they must sum to 1.`,
    );
  return amounts.map(({ id, fraction }) => ({ id, fraction: fraction / sum }));
}

/** First bubble of a liquid. @throws EquilibriumError */
export function bubblePoint(mixture: Mixture, at: At): SaturationResult {
  return saturationPoint('bubble', mixture, at);
}

/** First drop of a vapour. Of two dew pressures at one temperature (retrograde) it is the lower, ordinary one. @throws EquilibriumError */
export function dewPoint(mixture: Mixture, at: At): SaturationResult {
  return saturationPoint('dew', mixture, at);
}

function saturationPoint(kind: 'bubble' | 'dew', mixture: Mixture, at: At): SaturationResult {
  const held = at.temperature !== undefined ? 'temperature' : 'pressure';
  const value = checkedState(held, at.temperature ?? at.pressure);
  const all = normalised(mixture.components);
  // A component that is not there has no say, and a logarithm of its amount none either.
  const present = all.filter((amount) => amount.fraction > 0);
  const z = present.map((amount) => amount.fraction);
  const solved =
    mixture.method === 'ideal'
      ? idealPoint(kind, mixture, present, z, held, value)
      : pengRobinsonPoint(kind, present, z, held, value);
  const other = withAbsent(all, present, solved.incipient);
  const feed = all;
  return {
    temperature: solved.temperature,
    pressure: solved.pressure,
    slope: solved.slope,
    vapour: kind === 'dew' ? feed : other,
    liquid: kind === 'dew' ? other : feed,
    vapourFraction: kind === 'dew' ? 1 : 0,
    kValues: solved.kValues(all),
    warnings: solved.warnings,
  };
}

interface Point {
  readonly temperature: number;
  readonly pressure: number;
  readonly slope: number;
  readonly incipient: readonly number[];
  kValues(all: readonly Amount[]): number[];
  readonly warnings: readonly EquilibriumWarning[];
}

function idealPoint(
  kind: 'bubble' | 'dew',
  mixture: Mixture,
  present: readonly Amount[],
  z: readonly number[],
  held: 'temperature' | 'pressure',
  value: number,
): Point {
  const ids = present.map((amount) => amount.id);
  const ideal = new IdealMixture(ids, mixture.correlations);
  const start = z.reduce((sum, zi, i) => sum + zi * componentById(ids[i]!).normalBoilingPoint, 0);
  let temperature = value,
    pressure = value,
    slope: number;
  if (held === 'temperature') ({ pressure, slope } = ideal.saturationPressure(kind, z, value));
  else ({ temperature, slope } = ideal.saturationTemperature(kind, z, value, start));
  ideal.evaluate(temperature);
  const k = Array.from(ideal.logP, (lnP) => Math.exp(lnP) / pressure);
  return {
    temperature,
    pressure,
    slope,
    incipient: scaled(z.map((zi, i) => (kind === 'bubble' ? zi * k[i]! : zi / k[i]!))),
    kValues: (all) => {
      const every = new IdealMixture(
        all.map((amount) => amount.id),
        mixture.correlations,
      );
      every.evaluate(temperature);
      return Array.from(every.logP, (lnP) => Math.exp(lnP) / pressure);
    },
    warnings: ideal.warnings(temperature),
  };
}

function pengRobinsonPoint(
  kind: 'bubble' | 'dew',
  present: readonly Amount[],
  z: readonly number[],
  held: 'temperature' | 'pressure',
  value: number,
): Point {
  const line = new SaturationLine(
    present.map((amount) => componentById(amount.id)),
    z,
    kind === 'dew' ? 'vapour' : 'liquid',
  );
  const outcome = saturate(line, held, value);
  const { n } = line;
  if (outcome.kind === 'not-converged')
    throw new EquilibriumError(
      'not-converged',
      `No ${kind} point found: Newton from Wilson's K-values and the line followed up from low pressure both failed. Check the composition.`,
    );
  if (outcome.kind === 'beyond-line') {
    const limit =
      held === 'pressure'
        ? `${(outcome.highest / 1000).toPrecision(5)} kPa`
        : `${outcome.highest.toPrecision(5)} K`;
    throw new EquilibriumError(
      'no-two-phase-solution',
      `This mixture has no ${kind} point there: its ${kind} line ends at ${limit}${n === 1 ? ', its critical point' : ''}. Choose a lower ${held}.`,
    );
  }
  const u = outcome.point;
  const tangent = line.tangent(u, n + 1);
  const temperature = held === 'temperature' ? value : Math.exp(u[n]!);
  const pressure = held === 'pressure' ? value : Math.exp(u[n + 1]!);
  const byId = new Map(present.map((amount, i) => [amount.id, Math.exp(u[i]!)]));
  return {
    temperature,
    pressure,
    slope: tangent ? (tangent[n]! * temperature) / pressure : NaN,
    incipient: line.incipient(u),
    kValues: (all) => all.map((amount) => byId.get(amount.id) ?? NaN),
    warnings: [],
  };
}

/** Splits a mixture at one temperature and pressure. @throws EquilibriumError */
export function flash(
  mixture: Mixture,
  at: { readonly temperature: number; readonly pressure: number },
): EquilibriumResult {
  const temperature = checkedState('temperature', at.temperature);
  const pressure = checkedState('pressure', at.pressure);
  const all = normalised(mixture.components);
  const present = all.filter((amount) => amount.fraction > 0);
  const z = present.map((amount) => amount.fraction);
  const ids = present.map((amount) => amount.id);
  let split: Split;
  let warnings: readonly EquilibriumWarning[] = [];
  if (mixture.method === 'ideal') {
    const ideal = new IdealMixture(ids, mixture.correlations);
    split = flashIdeal(ideal, z, temperature, pressure);
    warnings = ideal.warnings(temperature);
  } else split = flashPengRobinson(ids.map(componentById), z, temperature, pressure);
  const k = new Map(present.map((amount, i) => [amount.id, split.K[i]!]));
  return {
    temperature,
    pressure,
    vapourFraction: split.vapourFraction,
    vapour: split.vapourFraction > 0 ? withAbsent(all, present, split.y) : [],
    liquid: split.vapourFraction < 1 ? withAbsent(all, present, split.x) : [],
    kValues:
      split.vapourFraction > 0 && split.vapourFraction < 1
        ? all.map((amount) => k.get(amount.id) ?? NaN)
        : [],
    warnings,
  };
}

function checkedState(what: 'temperature' | 'pressure', value: number | undefined): number {
  const [low, high, unit] = what === 'temperature' ? [30, 1500, 'K'] : [1e-3, 1e9, 'Pa'];
  if (value === undefined || !(value >= low && value <= high))
    throw new EquilibriumError(
      'bad-input',
      `The ${what} is ${String(value)} ${unit}; give one between ${low} and ${high} ${unit}.`,
    );
  return value;
}

function withAbsent(
  all: readonly Amount[],
  present: readonly Amount[],
  fractions: readonly number[],
): Amount[] {
  const byId = new Map(present.map((amount, i) => [amount.id, fractions[i]!]));
  return all.map(({ id }) => ({ id, fraction: byId.get(id) ?? 0 }));
}

function scaled(amounts: readonly number[]): number[] {
  const sum = amounts.reduce((total, amount) => total + amount, 0);
  return amounts.map((amount) => amount / sum);
}
