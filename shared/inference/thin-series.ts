export interface Thinned {
  /** Positions kept, in order. */
  readonly indices: readonly number[];
  /** Width of a stretch [ms]; 0 when nothing was left out. */
  readonly stretch: number;
}

/**
 * Thins a series for drawing: of each stretch of time its lowest and highest value are kept at their own times, and a
 * gap (null) stays a gap. No extreme is lost.
 *
 * @param points about how many to keep
 */
export function thinSeries(t: readonly number[], value: readonly (number | null)[], points: number): Thinned {
  const n = t.length;
  if (n <= points) return { indices: t.map((_, i) => i), stretch: 0 };
  const span = t[n - 1]! - t[0]! + 1;
  const stretch = Math.ceil(span / Math.max(1, Math.floor(points / 2)));
  const kept: number[] = [];
  let i = 0;
  while (i < n) {
    const end = t[0]! + (Math.floor((t[i]! - t[0]!) / stretch) + 1) * stretch;
    let lowest = -1;
    let highest = -1;
    let gap = -1;
    for (; i < n && t[i]! < end; i++) {
      const v = value[i];
      if (v == null) gap = i;
      else {
        if (lowest < 0 || v < value[lowest]!) lowest = i;
        if (highest < 0 || v > value[highest]!) highest = i;
      }
    }
    const chosen = [...new Set([lowest, highest, gap])].filter((index) => index >= 0).sort((a, b) => a - b);
    kept.push(...chosen);
  }
  return { indices: kept, stretch };
}
