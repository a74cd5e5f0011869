import type { SimulatedEquilibrium } from './equilibrium';

/** Raised when a saturation temperature is not found; in the simulated towers that is a bug. */
export class NotSaturated extends Error {}

/**
 * Temperature [K] at which the vapour `y` begins to condense at P [Pa], and the first liquid.
 *
 * Newton in ln Σ y/K over T, with the liquid renewed each time, until both stand still.
 *
 * @param x first guess of the liquid, overwritten by the answer, mole fractions summing to 1
 * @param start first guess of the temperature [K]; the answer does not depend on it
 * @param tolerance last step allowed in T [K], a tenth of it in x
 */
export function dewTemperature(
  model: SimulatedEquilibrium,
  P: number,
  y: Float64Array,
  x: Float64Array,
  start: number,
  tolerance = 1e-9,
): number {
  const n = model.components.length;
  let T = start;
  for (let round = 0; round < 100; round++) {
    model.evaluate(T, P, x, 0, y, 0);
    let sum = 0;
    let slope = 0;
    let total = 0;
    for (let i = 0; i < n; i++) {
      const xi = y[i]! / model.K[i]!;
      sum += xi;
      slope += xi * model.slope[i]!;
      total += y[i]!;
    }
    let change = 0;
    for (let i = 0; i < n; i++) {
      const next = y[i]! / model.K[i]! / sum;
      change = Math.max(change, Math.abs(next - x[i]!));
      x[i] = next;
    }
    // Far from the answer a Newton step may overshoot into nonsense; 20 K at a time is always safe.
    const step = clamp((Math.log(sum / total) * sum) / slope, 20);
    T += step;
    if (Math.abs(step) < tolerance && change < tolerance / 10) return T;
  }
  throw new NotSaturated(`no dew temperature at ${P} Pa for ${y.join(', ')}`);
}

/** Temperature [K] at which the liquid `x` begins to boil at P [Pa], and the first vapour; as `dewTemperature`. */
export function bubbleTemperature(
  model: SimulatedEquilibrium,
  P: number,
  x: Float64Array,
  y: Float64Array,
  start: number,
  tolerance = 1e-9,
): number {
  const n = model.components.length;
  let T = start;
  for (let round = 0; round < 100; round++) {
    model.evaluate(T, P, x, 0, y, 0);
    let sum = 0;
    let slope = 0;
    let total = 0;
    for (let i = 0; i < n; i++) {
      const yi = x[i]! * model.K[i]!;
      sum += yi;
      slope += yi * model.slope[i]!;
      total += x[i]!;
    }
    let change = 0;
    for (let i = 0; i < n; i++) {
      const next = (x[i]! * model.K[i]!) / sum;
      change = Math.max(change, Math.abs(next - y[i]!));
      y[i] = next;
    }
    const step = clamp((-Math.log(sum / total) * sum) / slope, 20);
    T += step;
    if (Math.abs(step) < tolerance && change < tolerance / 10) return T;
  }
  throw new NotSaturated(`no bubble temperature at ${P} Pa for ${x.join(', ')}`);
}

function clamp(value: number, limit: number): number {
  return Math.min(limit, Math.max(-limit, value));
}
