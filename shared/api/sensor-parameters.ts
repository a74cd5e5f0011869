import * as z from 'zod';
import { moleFraction, slug } from './common';

const positive = z.number().positive();
const range = z
  .tuple([z.number(), z.number()])
  .refine(([low, high]) => low < high, 'the lower end must lie below the upper');

/**
 * Everything a version of a sensor is made of. A live sensor never changes in place: another set of parameters is another
 * version. Temperatures in K, pressures in Pa, fractions in mol/mol; times wear their unit.
 */
export const sensorParameters = z.object({
  relation: z.enum(['dew', 'bubble']),
  method: z.enum(['ideal', 'peng-robinson']),
  /** Component id to vapour pressure row, where not the first choice. */
  correlations: z.record(z.string(), z.string()).default({}),
  /** The slate before any sample was used, and each component's group. */
  base: z
    .array(z.object({ id: slug, fraction: moleFraction, group: z.enum(['light', 'heavy']) }))
    .min(2)
    .max(40),
  tags: z.object({
    temperature: z.string(),
    pressure: z.string(),
    differentialPressure: z.string().optional(),
  }),
  /** Added to the pressure reading to get the pressure at the thermometer [Pa]: elevation, line loss. */
  pressureCorrection: z.number().default(0),
  alignment: z.object({
    /** Tags are averaged over this long before the moment they are lined up with. */
    windowMinutes: z.int().min(1).max(240),
    /** From the thermometer to the sample tap. */
    deadTimeMinutes: z.number().min(0).max(600),
    /** First-order lag of the reflux drum or sump; 0 where the sample is drawn at the thermometer. */
    residenceMinutes: z.number().min(0).max(600),
  }),
  correction: z.object({
    /** What the offset is added to. */
    domain: z.enum(['temperature', 'ln-fraction', 'fraction']),
    /** A gain of its own instead of the filter's. */
    fixedGain: z.number().gt(0).max(1).optional(),
    initialOffset: z.number(),
    initialVariance: positive,
    /** Variance the offset gains per hour (random walk), in the domain's unit squared. */
    driftVariancePerHour: positive,
    /** Standardised innovation beyond which a sample is held. */
    gate: positive,
  }),
  noise: z.object({
    /** Standard uncertainty of one minute's reading [K], [Pa]. */
    temperature: positive,
    pressure: positive,
    /** Standard uncertainty of the laboratory's group fraction: absolute [mol/mol] plus a share of the value. */
    laboratoryAbsolute: z.number().min(0),
    laboratoryRelative: z.number().min(0),
    /** Scatter of h by the slate's shape until the sensor's own samples say, as a share of h. */
    shapeRelative: z.number().min(0),
  }),
  validity: z.object({
    temperature: range,
    pressure: range,
    /** Largest believable change from one minute to the next [K], [Pa]. */
    temperatureStep: positive,
    pressureStep: positive,
    /** A reading older than this is missing. */
    staleMinutes: z.int().min(1),
    /** A reading that has not changed for this long is flat. */
    flatMinutes: z.int().min(2),
    /** Above it entrainment is suspected [Pa]. */
    differentialPressureLimit: positive.optional(),
    /** After this long without a used sample the value is Uncertain. */
    sampleAgeHours: positive,
    /** Components whose correlation may be used outside its range, as the engineer has decided at set-up. */
    acceptedExtrapolations: z.array(slug).default([]),
    /** Ratio of variances above which the tower is called not steady, and below which it is steady again. */
    steadiness: z
      .object({ transientAbove: positive, steadyBelow: positive })
      .refine(
        ({ transientAbove, steadyBelow }) => steadyBelow < transientAbove,
        'the lower ratio must lie below the upper',
      )
      .optional(),
  }),
  limits: z.object({
    high: moleFraction.optional(),
    low: moleFraction.optional(),
    target: moleFraction.optional(),
    /** Largest single move of temperature to advise [K]. */
    temperatureStep: positive,
  }),
});
export type SensorParameters = z.infer<typeof sensorParameters>;
