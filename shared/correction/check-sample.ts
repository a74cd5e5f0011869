import type { NewSample } from '../api/samples';
import { components } from '../vle/components';

/** A sum this far from 1 is put down to rounding and normalised; anything else is refused. Common practice, no source. */
export const acceptedSum = { low: 0.98, high: 1.02 } as const;

/** Clocks of laboratory and server may differ by this much [ms]. */
const clockTolerance = 60_000;

export interface SampleCheck {
  /** Sum of the fractions as given [mol/mol]. */
  readonly sum: number;
  /** Normalised fractions in the order given; empty while the sum is refused. */
  readonly normalised: readonly { readonly id: string; readonly fraction: number }[];
  /** Field (or component) to a sentence that says what to do; empty when the result may be entered. */
  readonly errors: Readonly<Record<string, string>>;
  /** Said, but no hindrance. */
  readonly remarks: readonly string[];
}

const names = new Map(components.map((component) => [component.id, component.name]));

/**
 * Checks a laboratory result the same way while it is typed and when it arrives.
 *
 * @param slate components the sensors at this point need; each must be given, zero included
 * @param now [UTC ms]
 */
export function checkSample(
  draft: Pick<NewSample, 'drawnAt' | 'receivedAt' | 'fractions'>,
  slate: readonly string[],
  now: number,
): SampleCheck {
  const errors: Record<string, string> = {};
  const remarks: string[] = [];
  const seen = new Set<string>();
  for (const { id, fraction } of draft.fractions) {
    if (!names.has(id)) errors[id] = `${id} is not a component Dewmark knows.`;
    else if (seen.has(id)) errors[id] = `${names.get(id)} is given twice; keep one of the two.`;
    else if (!Number.isFinite(fraction)) errors[id] = `Type a number for ${names.get(id)}.`;
    else if (fraction < 0) errors[id] = `${names.get(id)} cannot be negative.`;
    else if (fraction > 1) errors[id] = `${names.get(id)} cannot be more than 100 %.`;
    seen.add(id);
  }
  const missing = slate.filter((id) => !seen.has(id));
  for (const id of missing)
    errors[id] = `${names.get(id) ?? id} is missing; type 0 if the laboratory found none.`;
  if (!Number.isFinite(draft.drawnAt)) errors['drawnAt'] = 'Say when the sample was drawn.';
  else if (draft.drawnAt > now + clockTolerance)
    errors['drawnAt'] = 'The sample cannot have been drawn in the future.';
  if (!Number.isFinite(draft.receivedAt)) errors['receivedAt'] = 'Say when the result was received.';
  else if (draft.receivedAt > now + clockTolerance)
    errors['receivedAt'] = 'The result cannot have been received in the future.';
  else if (draft.receivedAt < draft.drawnAt)
    errors['receivedAt'] = 'The result cannot have been received before the sample was drawn.';
  const sum = draft.fractions.reduce(
    (total, { fraction }) => total + (Number.isFinite(fraction) ? fraction : 0),
    0,
  );
  const percent = Number((100 * sum).toFixed(3));
  // Rounding of the parts must not decide at the ends.
  const isAccepted = sum >= acceptedSum.low - 1e-9 && sum <= acceptedSum.high + 1e-9;
  if (!isAccepted)
    errors['sum'] =
      `The fractions sum to ${percent} %; a result must sum to between 98 and 102 %. Check each figure against the laboratory's report.`;
  else if (Math.abs(sum - 1) > 1e-9)
    remarks.push(`The fractions sum to ${percent} % and are normalised to 100 %.`);
  return {
    sum,
    normalised: isAccepted
      ? draft.fractions.map(({ id, fraction }) => ({ id, fraction: fraction / sum }))
      : [],
    errors,
    remarks,
  };
}
