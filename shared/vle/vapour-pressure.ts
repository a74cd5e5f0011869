import { componentById } from './components';
import { vapourPressureRows } from './data/vapour-pressure-rows';
import { EquilibriumError, type EquilibriumWarning } from './errors';

/** One published correlation, P in Pa and T in K. */
export interface VapourPressureRow {
  readonly id: string;
  readonly componentId: string;
  /** 1 is used unless another row is asked for. */
  readonly rank: number;
  readonly equation: 'wagner_2.5_5' | 'wagner_3_6' | 'dippr_101' | 'antoine';
  readonly coefficients: readonly number[];
  /** The critical point that belongs to a Wagner row; it may differ from the component's. */
  readonly criticalTemperature?: number;
  readonly criticalPressure?: number;
  /** Range the source states [K]. */
  readonly low: number;
  readonly high: number;
  readonly source: string;
  readonly table: string;
  readonly note: string;
}

const byId = new Map(vapourPressureRows.map((row) => [row.id, row]));

/** A component's rows, first choice first. */
export function correlationsOf(componentId: string): readonly VapourPressureRow[] {
  return vapourPressureRows.filter((row) => row.componentId === componentId).sort((a, b) => a.rank - b.rank);
}

/** @throws EquilibriumError when there is no such row, or it belongs to another component */
export function correlationById(rowId: string, componentId: string): VapourPressureRow {
  const row = byId.get(rowId);
  if (row?.componentId !== componentId)
    throw new EquilibriumError(
      'unknown-correlation',
      `"${rowId}" is not a vapour pressure correlation of ${componentId}.`,
    );
  return row;
}

/** ln P and its slope d(ln P)/dT; NaN where the formula has no value (a Wagner row above its critical temperature). */
export interface LogPressure {
  readonly value: number;
  readonly slope: number;
}

/** Evaluates one row as it stands, inside its range or not. */
export function logPressure(row: VapourPressureRow, T: number): LogPressure {
  const [a = 0, b = 0, c = 0, d = 0, e = 0] = row.coefficients;
  switch (row.equation) {
    case 'wagner_2.5_5':
      return wagner(row, T, [a, b, c, d], 2.5, 5);
    case 'wagner_3_6':
      return wagner(row, T, [a, b, c, d], 3, 6);
    case 'dippr_101':
      return {
        value: a + b / T + c * Math.log(T) + d * T ** e,
        slope: -b / (T * T) + c / T + d * e * T ** (e - 1),
      };
    case 'antoine':
      return { value: Math.LN10 * (a - b / (T + c)), slope: (Math.LN10 * b) / (T + c) ** 2 };
  }
}

function wagner(
  row: VapourPressureRow,
  T: number,
  [a, b, c, d]: readonly [number, number, number, number],
  m: number,
  n: number,
): LogPressure {
  const Tc = row.criticalTemperature!;
  const t = 1 - T / Tc;
  if (t < 0) return { value: NaN, slope: NaN };
  const f = a * t + b * t ** 1.5 + c * t ** m + d * t ** n;
  const df = a + 1.5 * b * Math.sqrt(t) + m * c * t ** (m - 1) + n * d * t ** (n - 1);
  return { value: Math.log(row.criticalPressure!) + (f * Tc) / T, slope: -df / T - (f * Tc) / (T * T) };
}

/** The correlation of one component in use: the row asked for, else the first choice with its stand-in above the critical temperature. */
export interface VapourPressure {
  readonly component: string;
  readonly row: VapourPressureRow;
  /** Highest temperature at which it has a value [K]. */
  readonly highest: number;
  /** ln(Psat/Pa) and slope at T [K]; NaN above `highest`. */
  at(T: number): LogPressure;
  /** The row that is used at T, the stand-in where it steps in. */
  rowAt(T: number): VapourPressureRow;
  /** @throws EquilibriumError where there is no value */
  evaluate(T: number): {
    readonly pressure: number;
    readonly row: VapourPressureRow;
    readonly inRange: boolean;
  };
  warning(T: number): EquilibriumWarning | undefined;
}

/**
 * Chooses a component's correlation. Without `rowId` it is the rank 1 row, and above that row's critical temperature the
 * DIPPR 101 row, which still evaluates there; an asked-for row is used as it is.
 *
 * @throws EquilibriumError for an unknown component or row
 */
export function vapourPressureOf(componentId: string, rowId?: string): VapourPressure {
  componentById(componentId);
  const rows = correlationsOf(componentId);
  const row = rowId === undefined ? rows[0] : correlationById(rowId, componentId);
  if (!row)
    throw new EquilibriumError(
      'unknown-correlation',
      `No vapour pressure correlation of ${componentId} is at hand.`,
    );
  const standIn =
    rowId === undefined ? rows.find((candidate) => candidate.equation === 'dippr_101') : undefined;
  const end = row.criticalTemperature ?? Infinity;
  const rowAt = (T: number) => (T > end && standIn ? standIn : row);
  const inRange = (T: number) => T >= rowAt(T).low && T <= rowAt(T).high;
  const at = (T: number) => logPressure(rowAt(T), T);
  return {
    component: componentId,
    row,
    highest: standIn ? Infinity : end,
    at,
    rowAt,
    evaluate: (T) => {
      const pressure = Math.exp(at(T).value);
      if (!(T > 0) || !Number.isFinite(pressure))
        throw new EquilibriumError(
          'bad-input',
          `${rowAt(T).id} has no value at ${T} K; it is stated for ${row.low} to ${row.high} K.`,
        );
      return { pressure, row: rowAt(T), inRange: inRange(T) };
    },
    warning: (T) =>
      inRange(T)
        ? undefined
        : {
            code: 'correlation-out-of-range',
            component: componentId,
            message: `${componentId}: ${rowAt(T).id} is stated for ${rowAt(T).low} to ${rowAt(T).high} K and is used at ${T.toFixed(2)} K.`,
          },
  };
}
