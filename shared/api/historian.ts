import * as z from 'zod';
import type { Quality } from '../inference/quality';
import { instant, slug } from './common';

/** Our own historian contract, version 1; written out with examples in fakes/historian/README.md. */
export const historianPaths = {
  tags: '/v1/tags',
  latest: '/v1/latest',
  raw: '/v1/raw',
  write: '/v1/write',
} as const;

/** Most values of one tag in one answer, and most tags in one question. */
export const maxValuesPerPage = 10_000;
export const maxTagsPerRequest = 1000;

/**
 * Status codes of IEC 62541 (OPC UA) that this contract names; a historian may answer any other one too.
 * The two highest bits say Good (00), Uncertain (01) or Bad (10).
 */
export const statusCodes = {
  Good: 0x00000000,
  Uncertain_LastUsableValue: 0x40900000,
  Uncertain_SubstituteValue: 0x40910000,
  Uncertain_SensorNotAccurate: 0x40930000,
  Uncertain_EngineeringUnitsExceeded: 0x40940000,
  Bad_NoCommunication: 0x80310000,
  Bad_NodeIdUnknown: 0x80340000,
  Bad_NotWritable: 0x803b0000,
  Bad_SensorFailure: 0x808c0000,
  Bad_OutOfService: 0x808d0000,
  Bad_NoData: 0x809b0000,
} as const;

/** What a status code says in its two highest bits; the reserved fourth pattern counts as Bad. */
export function qualityOfStatus(code: number): Quality {
  const severity = code >>> 30;
  return severity === 0 ? 'Good' : severity === 1 ? 'Uncertain' : 'Bad';
}

export const statusCode = z.int().min(0).max(0xffffffff);

const tagName = z.string().min(1).max(200);
const tagNames = z.array(tagName).min(1).max(maxTagsPerRequest);

/** A number, or null where there is none to give. NaN and infinities are not JSON and so cannot come. */
const reading = z.number().nullable();

export const historianTag = z.object({
  name: tagName,
  description: z.string(),
  /** Unit of every value of this tag, as people write it: "°C", "kPa gauge", "t/h". */
  unit: z.string(),
  /** Whether a value holds until the next one (set-points, modes); otherwise a straight line joins them. */
  stepped: z.boolean(),
  /** Whether POST /v1/write takes values for it. */
  writable: z.boolean(),
});
export type HistorianTag = z.infer<typeof historianTag>;

export const historianTagsQuery = z.object({
  /** Part of the name or the description, in any case. */
  search: z.string().max(200).optional(),
  cursor: z.string().max(2000).optional(),
  limit: z.coerce.number().int().min(1).max(1000).default(200),
});
export type HistorianTagsQuery = z.infer<typeof historianTagsQuery>;

export const historianTagPage = z.object({ tags: z.array(historianTag), next: z.string().nullable() });
export type HistorianTagPage = z.infer<typeof historianTagPage>;

export const historianLatestRequest = z.object({ tags: tagNames });

/** One value; `t` in UTC milliseconds, `value` in the tag's unit. */
export const historianValue = z.object({
  tag: tagName,
  t: instant,
  value: reading,
  status: statusCode,
});
export type HistorianValue = z.infer<typeof historianValue>;

/** One entry per tag asked for, in that order; an unknown tag has status Bad_NodeIdUnknown and value null. */
export const historianLatest = z.object({ values: z.array(historianValue) });
export type HistorianLatest = z.infer<typeof historianLatest>;

export const historianRawRequest = z
  .object({
    tags: tagNames,
    /** Interval [from, to): its start belongs to it, its end does not. */
    from: instant,
    to: instant,
    /** Most values of each tag in this answer. */
    limit: z.int().min(1).max(maxValuesPerPage).default(maxValuesPerPage),
    /** From the page before; everything else must be as it was there. */
    continuation: z.string().max(100_000).nullish(),
  })
  .refine(({ from, to }) => from <= to, { path: ['to'], message: 'must not be before from' });
export type HistorianRawRequest = z.input<typeof historianRawRequest>;

/** Columns of one tag, oldest first. */
export const historianSeries = z
  .object({
    tag: tagName,
    /** Good, or why nothing can be said of this tag (Bad_NodeIdUnknown): its columns are then empty. */
    result: statusCode,
    t: z.array(instant),
    value: z.array(reading),
    status: z.array(statusCode),
  })
  .refine(({ t, value, status }) => t.length === value.length && t.length === status.length, {
    message: 't, value and status must have the same length',
  });
export type HistorianSeries = z.infer<typeof historianSeries>;

/** One series per tag asked for, in that order; read on with `continuation` until it is null. */
export const historianRaw = z.object({
  series: z.array(historianSeries),
  continuation: z.string().nullable(),
});
export type HistorianRaw = z.infer<typeof historianRaw>;

export const historianWriteRequest = z.object({
  values: z.array(historianValue).min(1).max(maxValuesPerPage),
});
export type HistorianWriteRequest = z.infer<typeof historianWriteRequest>;

/** One result per value, in that order. A value for a time that has one replaces it: writing twice changes nothing. */
export const historianWritten = z.object({
  results: z.array(z.object({ tag: tagName, t: instant, status: statusCode })),
});
export type HistorianWritten = z.infer<typeof historianWritten>;

/** Only of the fake: what demo and tests may ask of the simulation behind the tags. */
export const historianControlPaths = {
  truth: '/control/truth',
  state: '/control/state',
  clock: '/control/clock',
} as const;

export const truthQuery = z.object({
  tower: slug,
  /** Interval [from, to). */
  from: z.coerce.number().pipe(instant),
  to: z.coerce.number().pipe(instant),
  /** Whole minutes between two points [ms]. */
  step: z.coerce.number().int().min(60_000).multipleOf(60_000).default(60_000),
});

/** Mole fractions by component id, one per time. */
const fractions = z.record(slug, z.array(z.number()));

/** True compositions at the places where samples are drawn, at each whole minute that is a multiple of `step` after `from`. */
export const truth = z.object({
  tower: slug,
  components: z.array(slug),
  t: z.array(instant),
  /** Vapour leaving the top of the tower. */
  overhead: fractions,
  /** Liquid product behind the reflux drum. */
  rundown: fractions,
  /** Liquid product of the reboiler. */
  bottoms: fractions,
});
export type Truth = z.infer<typeof truth>;

export const historianState = z.object({
  now: instant,
  clock: z.enum(['real', 'manual']),
  seed: z.int(),
  /** Time of the first value. */
  startAt: instant,
  towers: z.array(z.object({ id: slug, name: z.string(), components: z.array(slug) })),
});
export type HistorianState = z.infer<typeof historianState>;

export const clockSetting = z.object({ now: instant });
