import * as z from 'zod';
import { instant, quality, qualityReason, slug } from './common';
import { sensorParameters } from './sensor-parameters';

export const sensorsPath = '/api/sensors';
export const towersPath = '/api/towers';

const nullableNumber = z.number().nullable();

/** One evaluated minute. Fractions are those of the sensor's group; null where no number may be shown. */
export const estimate = z.object({
  t: instant,
  /** Tower-top (or sump) composition: what leaves the tower this minute [mol/mol]. */
  value: nullableNumber,
  /** Ends of the 95 % band [mol/mol]. */
  low: nullableNumber,
  high: nullableNumber,
  /** What the product line carries, behind drum residence and dead time [mol/mol]. */
  rundown: nullableNumber,
  /** Readings used: K, and Pa absolute at the thermometer. */
  temperature: nullableNumber,
  pressure: nullableNumber,
  /** Offset in force and its standard uncertainty, in the correction domain's unit (K by default). */
  offset: z.number(),
  offsetDeviation: z.number(),
  quality,
  reasons: z.array(qualityReason),
  versionId: z.int(),
  baseSampleId: z.int().nullable(),
});
export type Estimate = z.infer<typeof estimate>;

export const sampleState = z.enum(['pending', 'used', 'held', 'rejected']);
export type SampleState = z.infer<typeof sampleState>;

/** A sample as a sensor's trend shows it. */
export const samplePoint = z.object({
  id: z.int(),
  drawnAt: instant,
  /** The sensor's group fraction in the laboratory's result [mol/mol]. */
  value: z.number(),
  state: sampleState,
  /** Innovation over its expected deviation; null while pending. */
  standardisedInnovation: nullableNumber,
});
export type SamplePoint = z.infer<typeof samplePoint>;

/** One line of the Board. */
export const sensor = z.object({
  id: slug,
  towerId: slug,
  towerName: z.string(),
  /** What is inferred, where: "C4+ in propane, overhead". */
  name: z.string(),
  /** The group in short: "C4+". */
  symbol: z.string(),
  point: z.enum(['overhead', 'bottoms']),
  limits: z.object({ high: nullableNumber, low: nullableNumber, target: nullableNumber }),
  latest: estimate.nullable(),
  /** Change of the value over the last hour [mol/mol per h]; null when there is too little to say. */
  slopePerHour: nullableNumber,
  /** Chance of being beyond a limit now, 0…1. */
  offLimitProbability: nullableNumber,
  lastSample: samplePoint.nullable(),
  /** When the last sample that was used was drawn. */
  lastUsedSampleAt: instant.nullable(),
});
export type Sensor = z.infer<typeof sensor>;
export const sensorList = z.array(sensor);

/** Advice for a qualified operator: where to bring the temperature so that the product meets its target. */
export const nextMove = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('move'),
    /** Reading to bring the thermometer to [K], and the change from now [K]. */
    temperature: z.number(),
    change: z.number(),
    steps: z.int(),
    target: z.number(),
    /** Pressure it holds at [Pa absolute at the thermometer]. */
    pressure: z.number(),
    /** The change of pressure that would do the same at the present temperature [Pa]. */
    pressureInstead: z.number().nullable(),
  }),
  z.object({ kind: z.literal('on-target'), target: z.number() }),
  z.object({ kind: z.literal('none'), because: z.string() }),
]);
export type NextMove = z.infer<typeof nextMove>;

export const sensorDetail = sensor.extend({
  version: z
    .object({ id: z.int(), number: z.int(), madeLiveAt: instant, parameters: sensorParameters })
    .nullable(),
  nextMove,
});
export type SensorDetail = z.infer<typeof sensorDetail>;

export const tower = z.object({
  id: slug,
  name: z.string(),
  description: z.string(),
  sensorIds: z.array(slug),
});
export type Tower = z.infer<typeof tower>;
export const towerList = z.array(tower);

export const trendQuery = z.object({
  from: z.coerce.number().pipe(instant),
  to: z.coerce.number().pipe(instant),
  /** About how many points each line may have. */
  points: z.coerce.number().int().min(10).max(20_000).default(2000),
});
export type TrendQuery = z.infer<typeof trendQuery>;

const series = z.object({ t: z.array(instant), value: z.array(nullableNumber) });

/** Columns, oldest first. Where thinned, each stretch keeps its lowest and highest value at their own times. */
export const trend = z.object({
  sensorId: slug,
  from: instant,
  to: instant,
  /** Minutes one stretch stands for; 1 when nothing was left out. */
  bucketMinutes: z.int(),
  inferred: z.object({
    t: z.array(instant),
    value: z.array(nullableNumber),
    low: z.array(nullableNumber),
    high: z.array(nullableNumber),
    /** Index into Good, Uncertain, Bad. */
    quality: z.array(z.int().min(0).max(2)),
  }),
  rundown: series,
  temperature: series,
  pressure: series,
  offset: series,
  samples: z.array(samplePoint),
  notes: z.array(z.object({ id: z.int(), t: instant, text: z.string(), author: z.string() })),
});
export type Trend = z.infer<typeof trend>;
