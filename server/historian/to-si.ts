/** Factor and shift that bring a source's unit to SI: SI = value × factor + shift. */
interface ToSi {
  readonly factor: number;
  readonly shift: number;
}

const temperatures: Readonly<Record<string, ToSi>> = {
  K: { factor: 1, shift: 0 },
  '°C': { factor: 1, shift: 273.15 },
  C: { factor: 1, shift: 273.15 },
  degC: { factor: 1, shift: 273.15 },
  '°F': { factor: 5 / 9, shift: 273.15 - (32 * 5) / 9 },
  F: { factor: 5 / 9, shift: 273.15 - (32 * 5) / 9 },
  degF: { factor: 5 / 9, shift: 273.15 - (32 * 5) / 9 },
};

/** One psi is the pound-force over the square inch: 4.4482216152605 N / (0.0254 m)². */
const psi = 4.4482216152605 / 0.0254 ** 2;

const pressures: Readonly<Record<string, number>> = { Pa: 1, kPa: 1e3, MPa: 1e6, bar: 1e5, mbar: 100, psi };

/** Flows in kg/s. */
const flows: Readonly<Record<string, number>> = {
  'kg/s': 1,
  'kg/h': 1 / 3600,
  't/h': 1 / 3.6,
  't/d': 1 / 86.4,
};

/** What a tag measures; decides how its values become K and Pa. */
export type TagQuantity =
  'temperature' | 'pressure-gauge' | 'pressure-absolute' | 'pressure-difference' | 'flow' | 'other';

/**
 * How values of a tag become SI: K, Pa, kg/s; a quantity of no known kind stays as it is. A gauge pressure stays a gauge
 * pressure: the barometric pressure of the site is added where it is used.
 *
 * @param unit as the source writes it; words such as "gauge" or "abs" behind the unit are ignored
 * @returns undefined when the unit is not one of that quantity
 */
export function toSi(quantity: TagQuantity, unit: string): ToSi | undefined {
  const symbol = unit.trim().split(/[\s(]/)[0] ?? '';
  switch (quantity) {
    case 'temperature':
      return temperatures[symbol];
    case 'pressure-gauge':
    case 'pressure-absolute':
    case 'pressure-difference':
      return scale(pressures[symbol]);
    case 'flow':
      return scale(flows[symbol]);
    case 'other':
      return { factor: 1, shift: 0 };
  }
}

function scale(factor: number | undefined): ToSi | undefined {
  return factor === undefined ? undefined : { factor, shift: 0 };
}
