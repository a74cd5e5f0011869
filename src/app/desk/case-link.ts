import * as z from 'zod';
import { slug } from '@shared/api/common';
import { thermometerClasses } from '@shared/inference/instruments';
import {
  amountFault,
  answers,
  bases,
  methods,
  relations,
  typedNumber,
  type DeskCase,
  type SlateRow,
} from './desk-case';

/** What a link says: a case of its own, or the sensor to follow. */
export interface LinkedCase {
  readonly case: DeskCase;
  /** The sensor whose slate and readings are followed; null when the link holds a case. */
  readonly sensorId: string | null;
  /** What in the link could not be used, in words; empty when all of it could. */
  readonly faults: readonly string[];
}

type Params = Readonly<Record<string, string | undefined>>;

function isFinished(amount: string): boolean {
  return typedNumber(amount) !== undefined && amountFault(amount) === undefined;
}

const number = z.string().transform((text, context) => {
  const value = typedNumber(text);
  if (value !== undefined) return value;
  context.addIssue('not a number');
  return z.NEVER;
});
const row = z
  .tuple([slug, z.string().refine(isFinished), z.enum(['l', 'h'])])
  .transform(([id, amount, group]): SlateRow => ({
    id,
    amount,
    group: group === 'l' ? 'light' : 'heavy',
  }));
const listOf = <T extends z.ZodType>(separator: string, item: T) =>
  z.preprocess((text) => (typeof text === 'string' ? text.split(separator) : text), z.array(item).max(40));
const pieces = <T extends z.ZodType>(schema: T) =>
  z.preprocess((text) => (typeof text === 'string' ? text.split(':') : text), schema);

/** One entry a query parameter: how its text becomes part of the case, and what it is called when it cannot. */
const parts = {
  slate: {
    name: 'the slate',
    schema: listOf(',', pieces(row))
      .refine((rows) => new Set(rows.map(({ id }) => id)).size === rows.length)
      .transform((rows) => ({ rows })),
  },
  basis: { name: 'the basis', schema: z.enum(bases).transform((basis) => ({ basis })) },
  method: { name: 'the method', schema: z.enum(methods).transform((method) => ({ method })) },
  correlations: {
    name: 'the choice of correlations',
    // A row's id is its component, a slash, and the equation with its source.
    schema: listOf(',', z.string().regex(/^[a-z0-9-]+\/[a-z0-9-]+$/)).transform((ids) => ({
      correlations: Object.fromEntries(ids.map((id) => [id.slice(0, id.indexOf('/')), id])),
    })),
  },
  t: {
    name: 'the temperature',
    schema: number.pipe(z.number().gt(0).max(5000)).transform((temperature) => ({ temperature })),
  },
  p: {
    name: 'the pressure',
    schema: number.pipe(z.number().gt(0).max(1e10)).transform((pressure) => ({ pressure })),
  },
  answer: { name: 'the state shown', schema: z.enum(answers).transform((answer) => ({ answer })) },
  product: { name: 'the product', schema: z.enum(relations).transform((relation) => ({ relation })) },
  target: {
    name: 'the target',
    schema: number.pipe(z.number().min(0).max(1)).transform((target) => ({ target })),
  },
  pair: {
    name: 'the pair',
    schema: pieces(z.tuple([slug, slug]))
      .refine(([a, b]) => a !== b)
      .transform((pair) => ({ pair })),
  },
  class: {
    name: 'the thermometer class',
    schema: z.enum(thermometerClasses).transform((thermometer) => ({ thermometer })),
  },
  within: {
    name: "the pressure transmitter's tolerance",
    schema: number.pipe(z.number().min(0).max(1e9)).transform((pressureTolerance) => ({ pressureTolerance })),
  },
} satisfies Record<string, { name: string; schema: z.ZodType<Partial<DeskCase>, unknown> }>;

/**
 * The case that a link's query stands for. A part that cannot be used is left as it is in `start` and named in `faults`:
 * whoever follows a link that somebody's mail program broke still gets the rest.
 *
 * @param isKnown whether the component library has this id
 */
export function readLink(params: Params, start: DeskCase, isKnown: (id: string) => boolean): LinkedCase {
  const faults: string[] = [];
  // A slate comes with its own choices: those made for another one do not stay.
  let linked = params['slate'] === undefined ? start : { ...start, correlations: {}, pair: null };
  for (const [key, part] of Object.entries(parts)) {
    const text = params[key];
    if (text === undefined) continue;
    const parsed = part.schema.safeParse(text);
    if (parsed.success) linked = { ...linked, ...parsed.data };
    else faults.push(`${part.name} (${key}) was not understood`);
  }
  const unknown = linked.rows.filter(({ id }) => !isKnown(id)).map(({ id }) => id);
  if (unknown.length > 0) {
    faults.push(`the library has no ${unknown.join(', ')}`);
    linked = { ...linked, rows: linked.rows.filter(({ id }) => isKnown(id)) };
  }
  if (linked.pair?.some((id) => !isKnown(id))) linked = { ...linked, pair: null };
  const sensor = slug.safeParse(params['sensor']);
  if (params['sensor'] !== undefined && !sensor.success)
    faults.push('the sensor (sensor) was not understood');
  return { case: linked, sensorId: sensor.success ? sensor.data : null, faults };
}

/** The query that restores this case. Rows whose amount cannot be read are left out; SI units, whoever looks. */
export function writeLink(deskCase: DeskCase): Record<string, string> {
  const rows = deskCase.rows.filter(({ amount }) => isFinished(amount));
  const chosen = Object.values(deskCase.correlations);
  return {
    slate: rows.map(({ id, amount, group }) => `${id}:${typedNumber(amount)}:${group[0]}`).join(','),
    basis: deskCase.basis,
    method: deskCase.method,
    ...(chosen.length > 0 ? { correlations: chosen.join(',') } : {}),
    t: String(deskCase.temperature),
    p: String(deskCase.pressure),
    ...writeView(deskCase),
  };
}

/** The query that follows a sensor: its slate, method and readings come from the sensor itself. */
export function writeFollowLink(deskCase: DeskCase, sensorId: string): Record<string, string> {
  return { sensor: sensorId, ...writeView(deskCase) };
}

function writeView(deskCase: DeskCase): Record<string, string> {
  return {
    answer: deskCase.answer,
    product: deskCase.relation,
    target: String(deskCase.target),
    ...(deskCase.pair ? { pair: deskCase.pair.join(':') } : {}),
    class: deskCase.thermometer,
    within: String(deskCase.pressureTolerance),
  };
}
