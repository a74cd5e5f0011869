import * as z from 'zod';
import { instant, moleFraction, pageOf, slug } from './common';
import { sampleState } from './sensors';

export const samplesPath = '/api/samples';

export const newSample = z.object({
  towerId: slug,
  point: z.enum(['overhead', 'bottoms']),
  drawnAt: instant,
  receivedAt: instant,
  /** Mole fractions as reported; a sum from 0.98 to 1.02 is normalised, anything else refused. */
  fractions: z
    .array(z.object({ id: slug, fraction: moleFraction }))
    .min(2)
    .max(40),
  remark: z.string().trim().max(500).default(''),
});
export type NewSample = z.infer<typeof newSample>;

/** What one sample did to one sensor's offset. */
export const correction = z.object({
  sensorId: slug,
  decision: z.enum(['used', 'held', 'rejected']),
  /** The sensor's group fraction in the result [mol/mol]. */
  value: z.number(),
  /** Means of the readings it was lined up with: K, Pa absolute at the thermometer. */
  temperature: z.number(),
  pressure: z.number(),
  /** d: what the offset would have to be for the sensor to agree. */
  observedOffset: z.number(),
  /** ν = d − offset before; S its variance; gain the share of ν that was taken. */
  innovation: z.number(),
  innovationVariance: z.number(),
  gain: z.number(),
  offsetBefore: z.number(),
  offsetAfter: z.number(),
  varianceBefore: z.number(),
  varianceAfter: z.number(),
});
export type Correction = z.infer<typeof correction>;

export const sample = z.object({
  id: z.int(),
  towerId: slug,
  towerName: z.string(),
  point: z.enum(['overhead', 'bottoms']),
  drawnAt: instant,
  receivedAt: instant,
  /** When it was entered here, and by whom. */
  enteredAt: instant,
  enteredBy: z.string(),
  /** Normalised mole fractions. */
  fractions: z.array(z.object({ id: slug, fraction: z.number() })),
  /** The sum as reported, before it was normalised. */
  reportedSum: z.number(),
  remark: z.string(),
  state: sampleState,
  /** Why it is pending, held or rejected; empty when used. */
  stateReason: z.string(),
  corrections: z.array(correction),
});
export type Sample = z.infer<typeof sample>;
export const samplePage = pageOf(sample);

export const samplesQuery = z.object({
  towerId: slug.optional(),
  state: sampleState.optional(),
  cursor: z.string().max(100).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});

/** What entering a sample changed, for the person who entered it. */
export const sampleOutcome = z.object({
  sample,
  /** Whether the very same result had been entered before; then nothing changed. */
  alreadyThere: z.boolean(),
  effects: z.array(
    z.object({
      sensorId: slug,
      sensorName: z.string(),
      /** Present value and band [mol/mol] before and after; null where no number may be shown. */
      before: z.object({
        value: z.number().nullable(),
        low: z.number().nullable(),
        high: z.number().nullable(),
        offset: z.number(),
      }),
      after: z.object({
        value: z.number().nullable(),
        low: z.number().nullable(),
        high: z.number().nullable(),
        offset: z.number(),
      }),
    }),
  ),
});
export type SampleOutcome = z.infer<typeof sampleOutcome>;
