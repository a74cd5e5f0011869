import * as z from 'zod';
import { qualities, qualityReasons, type QualityReason } from '../inference/quality';

/** UTC milliseconds since 1970. */
export const instant = z.int().min(0).max(8_640_000_000_000);

/** Identifier of a tower, sensor, component …: lower-case words joined by hyphens. */
export const slug = z
  .string()
  .max(80)
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'lower-case letters, digits and single hyphens only');

export const moleFraction = z.number().min(0).max(1);

export const quality = z.enum(qualities);
export const qualityReason = z.enum(
  qualityReasons.map((reason) => reason.code) as [QualityReason, ...QualityReason[]],
);

/** One page of a list; `next` is given back as `cursor` to read on, null at the end. */
export function pageOf<T extends z.ZodType>(item: T) {
  return z.object({ items: z.array(item), next: z.string().nullable() });
}

/** RFC 9457 problem document; `detail` says what to do. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  /** The request's id, to be quoted to whoever reads the log. */
  instance: z.string().optional(),
  /** Field path to sentence, where single fields were at fault. */
  errors: z.record(z.string(), z.string()).optional(),
});
export type ProblemDocument = z.infer<typeof problem>;
