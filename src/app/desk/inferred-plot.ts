import type { EChartsCoreOption } from 'echarts/core';
import type { Inference } from '@shared/inference/inference';
import type { ChartColours } from '../ui/chart-colours';
import { attempt, inferredProduct, type Instruments } from './desk-answer';
import { plotAxis, plotFrame, plotLine, plotPoint, type PlotPoint, type ShownUnits } from './plot-frame';
import type { Slices } from './sliced-work';

/** The inferred group against temperature at one pressure, with what the two instruments leave open. */
export interface InferredPlot {
  readonly pressure: number;
  readonly points: readonly {
    readonly temperature: number;
    readonly groupFraction: number;
    /** Standard uncertainty [mol/mol]. */
    readonly uncertainty: number;
  }[];
  /** Why there is no line, in words; empty when there is one. */
  readonly words: string;
}

const steps = 60;
const bandName = 'band of the instruments, 95 %';
/** Coverage factor of the band: about 95 %. GUM 6.3.3 */
export const coverage = 2;

/**
 * How far up the plot goes: past target and present value, in steps of 1, 2 and 5 so that it stays while a slider moves.
 *
 * @param target and `present` are sums of the inferred group [mol/mol]
 */
export function plotCeiling(target: number, present: number): number {
  const least = Math.min(1, Math.max(2 * target, 1.3 * present, 1e-4));
  const decade = 10 ** Math.floor(Math.log10(least));
  const round = [1, 2, 5, 10].map((step) => step * decade).find((step) => step >= least * 0.999999);
  return Math.min(1, round ?? 1);
}

/** Works out the plot from none of the inferred group to `ceiling`, giving way after each point. */
export function* inferredPlot(
  inference: Inference,
  pressure: number,
  ceiling: number,
  instruments: Instruments,
): Slices<InferredPlot> {
  const temperatureAt = (groupFraction: number) =>
    inference.equilibriumTemperature(inference.compositionAt(groupFraction), pressure).temperature;
  const ends = attempt(() => [temperatureAt(0), temperatureAt(ceiling)] as const);
  yield;
  if (ends.kind === 'refused') return { pressure, points: [], words: ends.words };
  const [none, most] = ends.value;
  const points: InferredPlot['points'][number][] = [];
  let words = '';
  for (let i = 0; i <= steps; i++) {
    const temperature = none + ((most - none) * i) / steps;
    const outcome = attempt(() => inferredProduct(inference, temperature, pressure, instruments));
    if (outcome.kind === 'refused') words = outcome.words;
    else {
      const { groupFraction, uncertainty } = outcome.value;
      points.push({ temperature, groupFraction, uncertainty });
    }
    yield;
  }
  return { pressure, points, words };
}

export interface InferredMarks {
  /** What is inferred: "C4+ (heavy)". */
  readonly product: string;
  readonly target: number;
  /** Present temperature [K] and inferred sum, null where there is none. */
  readonly present: { readonly temperature: number; readonly groupFraction: number } | null;
}

export function toInferredOption(
  plot: InferredPlot,
  { product, target, present }: InferredMarks,
  shown: ShownUnits,
  colours: ChartColours,
): EChartsCoreOption {
  const at = (temperature: number, fraction: number): PlotPoint => [
    shown.temperature(temperature),
    shown.fraction(fraction),
  ];
  const edge = (sign: 1 | -1) =>
    plot.points.map((point) =>
      at(
        point.temperature,
        Math.min(1, Math.max(0, point.groupFraction + sign * coverage * point.uncertainty)),
      ),
    );
  // A closed outline, there and back: stacked lines would part where the lower edge is held at zero.
  const outline = [...edge(1), ...edge(-1).reverse()];
  return {
    ...plotFrame(
      `${product} against temperature at the present pressure, with its band.`,
      [
        { name: 'inferred', is: 'line' },
        { name: bandName, is: 'area' },
      ],
      colours,
    ),
    xAxis: plotAxis(`temperature, ${shown.temperatureUnit}`, colours, 'x'),
    yAxis: { ...plotAxis(`${product}, ${shown.fractionUnit}`, colours, 'y'), min: 0 },
    series: [
      {
        type: 'custom',
        id: 'band',
        name: bandName,
        silent: true,
        clip: true,
        itemStyle: { color: colours.band },
        // One datum for the whole outline; its extent makes room on both axes.
        data: outline.length > 0 ? [[...extent(outline, 0), ...extent(outline, 1)]] : [],
        encode: { x: [0, 1], y: [2, 3] },
        renderItem: (_: unknown, api: { coord: (point: readonly (number | null)[]) => number[] }) => ({
          type: 'polygon',
          shape: { points: outline.map((point) => api.coord(point)) },
          style: { fill: colours.band },
        }),
        z: 2,
      },
      {
        ...plotLine(
          'inferred',
          plot.points.map((point) => at(point.temperature, point.groupFraction)),
          colours.inferred,
        ),
        markLine: {
          silent: true,
          symbol: 'none',
          lineStyle: { color: colours.limit, type: 'dotted', width: 2 },
          label: { formatter: 'target', position: 'insideStartTop', color: colours.limit },
          data: [{ yAxis: shown.fraction(target) }],
        },
      },
      {
        ...plotPoint('now', present && at(present.temperature, present.groupFraction), colours),
      },
    ],
  };
}

function extent(points: readonly PlotPoint[], side: 0 | 1): [number, number] {
  const values = points.map((point) => point[side] ?? 0);
  return [Math.min(...values), Math.max(...values)];
}
