import type { EChartsCoreOption } from 'echarts/core';
import { bubblePoint, type Mixture } from '@shared/vle/equilibrium';
import type { ChartColours } from '../ui/chart-colours';
import { attempt } from './desk-answer';
import { plotAxis, plotFrame, plotLine, type ShownUnits } from './plot-frame';
import type { Slices } from './sliced-work';

/** Boiling of two components alone: at each liquid fraction of the first, the temperature and the vapour over it. */
export interface TxyPlot {
  readonly pair: readonly [string, string];
  readonly pressure: number;
  readonly points: readonly { readonly temperature: number; readonly x: number; readonly y: number }[];
  /** Why the lines do not run from one pure component to the other; empty when they do. */
  readonly words: string;
}

const steps = 40;
const bubble = 'bubble line (liquid)';
const dew = 'dew line (vapour)';

/** Works out the plot, giving way after each point. */
export function* txyPlot(
  pair: readonly [string, string],
  pressure: number,
  how: Pick<Mixture, 'method' | 'correlations'>,
): Slices<TxyPlot> {
  const [a, b] = pair;
  const points: { temperature: number; x: number; y: number }[] = [];
  let words = '';
  for (let i = 0; i <= steps; i++) {
    const x = i / steps;
    const components = [
      { id: a, fraction: x },
      { id: b, fraction: 1 - x },
    ];
    const outcome = attempt(() => bubblePoint({ ...how, components }, { pressure }));
    if (outcome.kind === 'refused') words = outcome.words;
    else
      points.push({ temperature: outcome.value.temperature, x, y: outcome.value.vapour[0]?.fraction ?? x });
    yield;
  }
  return { pair, pressure, points, words };
}

/**
 * The plot in the person's units.
 *
 * @param names of the two components, as people read them
 * @param temperature the present one [K], drawn across
 */
export function toTxyOption(
  plot: TxyPlot,
  names: readonly [string, string],
  temperature: number,
  shown: ShownUnits,
  colours: ChartColours,
): EChartsCoreOption {
  const [first, second] = names;
  const T = (kelvin: number) => shown.temperature(kelvin);
  const present = T(temperature);
  const temperatures = plot.points.map((point) => T(point.temperature));
  const [lowest, highest] = [Math.min(...temperatures), Math.max(...temperatures)];
  const isInside = present >= lowest && present <= highest;
  return {
    ...plotFrame(
      `Boiling and dew temperature of ${first} and ${second} alone, against the fraction of ${first}.`,
      [bubble, dew].map((name) => ({ name, is: 'line' as const })),
      colours,
    ),
    xAxis: { ...plotAxis(`${first} in ${second}, mol %`, colours, 'x'), min: 0, max: 100 },
    yAxis: plotAxis(`temperature, ${shown.temperatureUnit}`, colours, 'y'),
    series: [
      {
        ...plotLine(
          bubble,
          plot.points.map((point) => [100 * point.x, T(point.temperature)]),
          colours.inferred,
        ),
        markLine: isInside
          ? {
              silent: true,
              symbol: 'none',
              lineStyle: { color: colours.ink, type: 'dotted', width: 1 },
              label: {
                formatter: 'present temperature',
                // The lines fall from left to right: below half way there is room on the left, else on the right.
                position: present < (lowest + highest) / 2 ? 'insideStartTop' : 'insideEndTop',
                color: colours.soft,
              },
              data: [{ yAxis: present }],
            }
          : undefined,
      },
      plotLine(
        dew,
        plot.points.map((point) => [100 * point.y, T(point.temperature)]),
        colours.inferred,
        'dashed',
      ),
    ],
  };
}
