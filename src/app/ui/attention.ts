import type { Sensor } from '@shared/api/sensors';

/** Why a product needs a look, in the order in which it does. */
export const attentionKinds = [
  'off-limit',
  'bad',
  'stale',
  'uncertain',
  'near-limit',
  'sample-due',
  'calm',
] as const;
export type AttentionKind = (typeof attentionKinds)[number];

export interface Attention {
  readonly kind: AttentionKind;
  /** In a few words; empty when calm. */
  readonly words: string;
  /** How loudly it is drawn. */
  readonly tone: 'urgent' | 'attention' | 'calm';
}

/** A new minute comes each minute: after this long without one, something on the way has stopped. */
export const staleAfterMs = 3 * 60_000;
/** Three samples a day: common practice, no source. Later than this, one is due. */
export const sampleDueAfterMs = 8 * 3_600_000;

/** Whether no new minute has come for longer than it should take. */
export function isStale(sensor: Sensor, now: number): boolean {
  return sensor.latest !== null && now - sensor.latest.t > staleAfterMs;
}

/** What about this product needs a person most. @param now UTC milliseconds */
export function assess(sensor: Sensor, now: number): Attention {
  const { latest, limits } = sensor;
  const value = latest?.value ?? null;
  if (value !== null && limits.high !== null && value > limits.high)
    return urgent('off-limit', 'above limit');
  if (value !== null && limits.low !== null && value < limits.low) return urgent('off-limit', 'below limit');
  if (latest === null) return urgent('bad', 'no value yet');
  if (latest.quality === 'Bad') return urgent('bad', 'do not use this value');
  if (isStale(sensor, now)) return urgent('stale', 'no new value');
  if (latest.quality === 'Uncertain') return attention('uncertain', 'use with care');
  if (limits.high !== null && latest.high !== null && latest.high > limits.high)
    return attention('near-limit', 'may be above limit');
  if (limits.low !== null && latest.low !== null && latest.low < limits.low)
    return attention('near-limit', 'may be below limit');
  if (sensor.lastUsedSampleAt === null || now - sensor.lastUsedSampleAt > sampleDueAfterMs)
    return attention('sample-due', 'a sample is due');
  return { kind: 'calm', words: '', tone: 'calm' };
}

export interface AssessedSensor {
  readonly sensor: Sensor;
  readonly attention: Attention;
}

/** Who needs a look first: by kind, then by the chance of being beyond a limit, then by name so that nothing jumps about. */
export function byNeed(a: AssessedSensor, b: AssessedSensor): number {
  return (
    attentionKinds.indexOf(a.attention.kind) - attentionKinds.indexOf(b.attention.kind) ||
    // In steps of 10 %: rows whose chances differ by noise do not change places each minute.
    chanceStep(b.sensor) - chanceStep(a.sensor) ||
    a.sensor.towerName.localeCompare(b.sensor.towerName) ||
    a.sensor.name.localeCompare(b.sensor.name)
  );
}

/** The Board in one sentence: `4 products: 1 off limit, 1 uncertain`. */
export function summaryWords(rows: readonly AssessedSensor[]): string {
  const counted = attentionKinds
    .filter((kind) => kind !== 'calm')
    .map((kind) => ({ kind, count: rows.filter((row) => row.attention.kind === kind).length }))
    .filter(({ count }) => count > 0)
    .map(({ kind, count }) => `${count} ${kindWords[kind]}`);
  const products = rows.length === 1 ? '1 product' : `${rows.length} products`;
  return `${products}: ${counted.length > 0 ? counted.join(', ') : 'all well'}`;
}

const kindWords: Record<Exclude<AttentionKind, 'calm'>, string> = {
  'off-limit': 'off limit',
  bad: 'without a usable value',
  stale: 'without a new value',
  uncertain: 'uncertain',
  'near-limit': 'near its limit',
  'sample-due': 'due for a sample',
};

function chanceStep(sensor: Sensor): number {
  return Math.round((sensor.offLimitProbability ?? 0) * 10);
}

function urgent(kind: AttentionKind, words: string): Attention {
  return { kind, words, tone: 'urgent' };
}

function attention(kind: AttentionKind, words: string): Attention {
  return { kind, words, tone: 'attention' };
}
