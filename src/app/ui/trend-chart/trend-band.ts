import type { Trend } from '@shared/api/sensors';
import type { ChartColours } from '../chart-colours';
import type { TrendWords } from './trend-picture';

/** What a custom series is asked to draw with. */
interface Drawing {
  coord(point: readonly [number, number]): readonly [number, number];
}

/** The band as one polygon for each stretch without a gap: two stacked lines would be sampled at different times. */
export function bandSeries({ inferred }: Trend, words: TrendWords, colours: ChartColours) {
  const stretches = bandStretches(inferred);
  return {
    type: 'custom' as const,
    id: 'band',
    name: 'band, 95 %',
    silent: true,
    z: 2,
    clip: true,
    // One datum that spans everything, so that zooming never takes it for outside.
    encode: { x: [0, 1], y: [2] },
    data: inferred.t.length === 0 ? [] : [[inferred.t[0]!, inferred.t.at(-1)!, 0]],
    renderItem: (_params: unknown, drawing: Drawing) => ({
      type: 'group',
      children: stretches.map((stretch) => ({
        type: 'polygon',
        shape: {
          points: [
            ...stretch.map(({ t, high }) => drawing.coord([t, words.fraction(high)])),
            ...[...stretch].reverse().map(({ t, low }) => drawing.coord([t, words.fraction(low)])),
          ],
        },
        style: { fill: colours.band },
      })),
    }),
  };
}

interface BandPoint {
  readonly t: number;
  readonly low: number;
  readonly high: number;
}

/** Stretches of the band between gaps, oldest first. */
export function bandStretches({ t, low, high }: Trend['inferred']): BandPoint[][] {
  const stretches: BandPoint[][] = [];
  let open: BandPoint[] | undefined;
  for (const [i, time] of t.entries()) {
    const below = low[i];
    const above = high[i];
    if (below == null || above == null) {
      open = undefined;
      continue;
    }
    if (!open) stretches.push((open = []));
    open.push({ t: time, low: below, high: above });
  }
  return stretches.filter((stretch) => stretch.length > 1);
}
