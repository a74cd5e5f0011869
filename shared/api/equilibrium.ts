import * as z from 'zod';
import { slug } from './common';

export const equilibriumPath = '/api/equilibrium';

export const method = z.enum(['ideal', 'peng-robinson']);

const amount = z.object({ id: slug, fraction: z.number() });
const amounts = z.array(amount).min(1, 'Give at least one component.').max(50);

/** Component id to the `row_id` of a vapour pressure correlation. */
const correlations = z.record(z.string(), z.string()).optional();

/** [K] */
const temperature = z.number();
/** [Pa absolute] */
const pressure = z.number();

export const saturationRequest = z
  .object({
    method,
    components: amounts,
    temperature: temperature.optional(),
    pressure: pressure.optional(),
    correlations,
  })
  .refine((request) => (request.temperature === undefined) !== (request.pressure === undefined), {
    message: 'Give either a temperature or a pressure, not both.',
    path: ['temperature'],
  });
export type SaturationRequest = z.infer<typeof saturationRequest>;

export const flashRequest = z.object({ method, components: amounts, temperature, pressure, correlations });
export type FlashRequest = z.infer<typeof flashRequest>;

export const equilibriumWarning = z.object({ code: z.string(), component: z.string(), message: z.string() });

/** Mole fractions in the order asked; a phase that is not there is empty. `slope` is dT/dP along the line [K/Pa]. */
export const equilibriumAnswer = z.object({
  temperature,
  pressure,
  vapour: z.array(amount),
  liquid: z.array(amount),
  vapourFraction: z.number(),
  slope: z.number().optional(),
  warnings: z.array(equilibriumWarning),
});

export const vapourPressureRequest = z.object({ id: slug, temperature, correlation: z.string().optional() });
export const vapourPressureAnswer = z.object({ pressure, correlation: z.string(), inRange: z.boolean() });

export const inferenceRequest = z.object({
  relation: z.enum(['dew', 'bubble']),
  method,
  base: z
    .array(amount.extend({ group: z.enum(['light', 'heavy']) }))
    .min(2, 'Give at least two components.')
    .max(50),
  temperature,
  pressure,
  /** Added to the temperature [K]. */
  offset: z.number().default(0),
  correlations,
});

/** `groupFraction` is the heavy group's sum for dew and the light group's for bubble; sensitivities per K and per Pa. */
export const inferenceAnswer = z.object({
  groupFraction: z.number(),
  composition: z.array(amount),
  sensitivity: z.object({ temperature: z.number(), pressure: z.number() }),
  clamped: z.boolean(),
  warnings: z.array(equilibriumWarning),
});

export const componentList = z.array(
  z.object({
    id: slug,
    name: z.string(),
    short: z.string(),
    cas: z.string(),
    formula: z.string(),
    molarMass: z.number(),
    criticalTemperature: z.number(),
    criticalPressure: z.number(),
    acentricFactor: z.number(),
    criticalSource: z.string(),
    normalBoilingPoint: z.number(),
    normalBoilingPointSource: z.string(),
    correlations: z.array(
      z.object({ id: z.string(), rank: z.int(), low: z.number(), high: z.number(), source: z.string() }),
    ),
  }),
);
