/** Coverage factor of the expanded uncertainty: about 95 % for a normal distribution. @source gum, 6.2 and G.6.6 */
export const coverageFactor = 2;

/** Below it ln h stays finite [mol/mol]. */
const smallest = 1e-7;

export interface BandTerms {
  /** ∂h/∂T [1/K] and ∂h/∂P [1/Pa] at the estimate. */
  readonly byTemperature: number;
  readonly byPressure: number;
  /** ∂h/∂δ, and the variance of the offset δ. */
  readonly byOffset: number;
  readonly offsetVariance: number;
  /** Standard uncertainty of one minute's readings [K], [Pa]. */
  readonly temperature: number;
  readonly pressure: number;
  /** Scatter of h by the changing shape of the slate, as a share of h. */
  readonly shapeRelative: number;
}

/** Variance terms of h [(mol/mol)²]. @source gum, 5.1.2 (uncorrelated inputs) */
export function varianceTerms(h: number, terms: BandTerms) {
  return {
    offset: terms.byOffset ** 2 * terms.offsetVariance,
    temperature: (terms.byTemperature * terms.temperature) ** 2,
    pressure: (terms.byPressure * terms.pressure) ** 2,
    shape: (h * terms.shapeRelative) ** 2,
  };
}

export function standardUncertainty(h: number, terms: BandTerms): number {
  const { offset, temperature, pressure, shape } = varianceTerms(h, terms);
  return Math.sqrt(offset + temperature + pressure + shape);
}

export interface Band {
  readonly low: number;
  readonly high: number;
}

/**
 * The 95 % band of a fraction, formed in ln of the smaller of h and 1 − h, so that it stays inside 0…1 and is drawn as
 * lopsided as it is.
 */
export function bandOf(h: number, deviation: number): Band {
  const isSmall = h <= 0.5;
  const part = Math.max(isSmall ? h : 1 - h, smallest);
  const factor = Math.exp((coverageFactor * deviation) / part);
  const near = part / factor;
  const far = Math.min(1, part * factor);
  return isSmall ? { low: near, high: far } : { low: 1 - far, high: 1 - near };
}

/** Standard deviation in ln h that a stored band was made with. */
export function logDeviationOf(h: number, band: Band): number {
  const isSmall = h <= 0.5;
  const part = Math.max(isSmall ? h : 1 - h, smallest);
  const near = isSmall ? band.low : 1 - band.high;
  return Math.log(part / Math.max(near, 1e-300)) / coverageFactor;
}
