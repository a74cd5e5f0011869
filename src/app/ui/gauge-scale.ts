const niceSteps = [1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10];

/**
 * Ends of a gauge [mol/mol] that shows limits and values together.
 *
 * It begins at zero unless everything would crowd into the far end, as with a purity and its limit. The limits rule
 * the far end, so that the picture stands still while the value moves, until a value comes near that end.
 */
export function gaugeScale(shown: {
  readonly limits: readonly (number | null)[];
  readonly values: readonly (number | null)[];
}): { min: number; max: number } {
  const limits = shown.limits.filter((limit) => limit !== null);
  const values = shown.values.filter((value) => value !== null);
  const all = [...limits, ...values];
  if (all.length === 0) return { min: 0, max: 0.01 };
  const [lowest, highest] = [Math.min(...all), Math.max(...all)];
  if (highest <= 0) return { min: 0, max: 0.01 };

  if (lowest > 0.6 && highest - lowest < 0.4 * highest) {
    const span = Math.max(highest - lowest, 0.02 * highest);
    return { min: Math.max(0, lowest - span), max: Math.min(1, highest + span) };
  }
  const wanted = Math.max(...limits.map((limit) => 1.6 * limit), ...values.map((value) => 1.1 * value));
  return { min: 0, max: Math.min(1, niceCeiling(wanted)) };
}

function niceCeiling(value: number): number {
  const decade = 10 ** Math.floor(Math.log10(value));
  // The tolerance keeps 0.3 from becoming 0.4 by its last bit.
  const step = niceSteps.find((candidate) => candidate * decade >= value * (1 - 1e-9)) ?? 10;
  return step * decade;
}
