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
  /** ln of that pressure, kept beside it since every evaluation needs it. */
  readonly logCriticalPressure?: number;
  /** Range the source states [K]. */
  readonly low: number;
  readonly high: number;
  readonly source: string;
  readonly table: string;
  readonly note: string;
}

const rows: readonly VapourPressureRow[] = vapourPressureRows.map((row) =>
  row.criticalPressure === undefined ? row : { ...row, logCriticalPressure: Math.log(row.criticalPressure) },
);
const byId = new Map(rows.map((row) => [row.id, row]));

/** Rows by component, first choice first. */
const byComponent = new Map<string, VapourPressureRow[]>();
for (const row of [...rows].sort((a, b) => a.rank - b.rank)) {
  const own = byComponent.get(row.componentId);
  if (own) own.push(row);
  else byComponent.set(row.componentId, [row]);
}

/** A component's rows, first choice first. */
export function correlationsOf(componentId: string): readonly VapourPressureRow[] {
  return byComponent.get(componentId) ?? [];
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
  const value = new Float64Array(1);
  const slope = new Float64Array(1);
  evaluateLogPressure(row, T, value, slope, 0);
  return { value: value[0]!, slope: slope[0]! };
}

/** The same without an object a call: `value[at]` and `slope[at]` are written. */
export function evaluateLogPressure(
  row: VapourPressureRow,
  T: number,
  value: Float64Array,
  slope: Float64Array,
  at: number,
): void {
  const k = row.coefficients;
  const [a, b, c] = [k[0]!, k[1]!, k[2]!];
  switch (row.equation) {
    case 'wagner_2.5_5': {
      const Tc = row.criticalTemperature!;
      const t = 1 - T / Tc;
      const root = Math.sqrt(t);
      const d = k[3]!;
      const t2 = t * t;
      const f = t * (a + b * root + c * t * root + d * t2 * t2);
      value[at] = row.logCriticalPressure! + (f * Tc) / T;
      slope[at] = -(a + 1.5 * b * root + 2.5 * c * t * root + 5 * d * t2 * t2) / T - (f * Tc) / (T * T);
      return;
    }
    case 'wagner_3_6': {
      const Tc = row.criticalTemperature!;
      const t = 1 - T / Tc;
      const root = Math.sqrt(t);
      const d = k[3]!;
      const t2 = t * t;
      const f = t * (a + b * root + c * t2 + d * t2 * t2 * t);
      value[at] = row.logCriticalPressure! + (f * Tc) / T;
      slope[at] = -(a + 1.5 * b * root + 3 * c * t2 + 6 * d * t2 * t2 * t) / T - (f * Tc) / (T * T);
      return;
    }
    case 'dippr_101': {
      const [d, e] = [k[3]!, k[4]!];
      const power = e === 2 ? T * T : e === 6 ? (T * T * T) ** 2 : T ** e;
      value[at] = a + b / T + c * Math.log(T) + d * power;
      slope[at] = (-b / T + c + d * e * power) / T;
      return;
    }
    case 'antoine':
      value[at] = Math.LN10 * (a - b / (T + c));
      slope[at] = (Math.LN10 * b) / (T + c) ** 2;
  }
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

/** One warning a row, made when it is first needed: a sensor may ask for it each minute. */
const warnings = new Map<string, EquilibriumWarning>();

function warningOf(row: VapourPressureRow): EquilibriumWarning {
  let known = warnings.get(row.id);
  if (!known) {
    const message = `${row.componentId}: ${row.id} is stated for ${row.low} to ${row.high} K and is used outside that range.`;
    warnings.set(row.id, (known = { code: 'correlation-out-of-range', component: row.componentId, message }));
  }
  return known;
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
    warning: (T) => (inRange(T) ? undefined : warningOf(rowAt(T))),
  };
}
