import type { EChartsCoreOption } from 'echarts/core';
import type { SampleState, Trend } from '@shared/api/sensors';
import { chartFonts, type ChartColours } from '../ui/chart-colours';
import { formatNumber } from '../ui/numbers';

/** How the trend writes what it shows: canonical in, the person's units and the plant's time out. */
export interface TrendWords {
  readonly fraction: (moleFraction: number) => number;
  readonly fractionUnit: string;
  readonly temperature: (kelvin: number) => number;
  readonly temperatureUnit: string;
  readonly pressure: (pascal: number) => number;
  readonly pressureUnit: string;
  readonly offset: (kelvin: number) => number;
  readonly offsetUnit: string;
  /** The plant's wall clock minus UTC [ms]: ticks fall on the plant's hours and midnights. */
  readonly zoneOffset: number;
  /** `14:07`, and `2 Dec` where a day begins. */
  readonly axisTime: (t: number) => string;
  /** `2 Dec, 14:07 AST`. */
  readonly fullTime: (t: number) => string;
  /** A number of the composition lane in words, with its decimals. */
  readonly fractionText: (moleFraction: number) => string;
}

export interface TrendPicture {
  readonly trend: Trend;
  readonly symbol: string;
  readonly limits: {
    readonly high: number | null;
    readonly low: number | null;
    readonly target: number | null;
  };
  /** Ends of the time axis [UTC ms]. */
  readonly from: number;
  readonly to: number;
  readonly isNarrow: boolean;
}

/** Height of each lane and where it begins [px]; the sum is the picture's height. */
export const lanes = {
  composition: { top: 34, height: 250 },
  temperature: { top: 322, height: 80 },
  pressure: { top: 440, height: 80 },
  offset: { top: 558, height: 60 },
  height: 656,
} as const;

/** Signs of a sample by its state: told apart by shape, not by colour. */
export const sampleSigns: Readonly<
  Record<SampleState, { readonly symbol: string; readonly isFilled: boolean }>
> = {
  used: { symbol: 'diamond', isFilled: true },
  held: { symbol: 'diamond', isFilled: false },
  rejected: {
    symbol: 'path://M0 1 L1 0 L5 4 L9 0 L10 1 L6 5 L10 9 L9 10 L5 6 L1 10 L0 9 L4 5 Z',
    isFilled: true,
  },
  pending: { symbol: 'circle', isFilled: false },
};

/** What echarts hands to a tooltip's formatter, as far as it is used here. */
interface TooltipPart {
  readonly axisValue: number;
}

/** The picture of one sensor's past: composition with its band, samples and limits; temperature, pressure and offset beneath on the same time axis. */
export function toTrendOption(
  picture: TrendPicture,
  words: TrendWords,
  colours: ChartColours,
): EChartsCoreOption {
  const { trend, limits, from, to } = picture;
  const left = picture.isNarrow ? 48 : 64;
  const right = picture.isNarrow ? 12 : 20;
  const names = [
    `${picture.symbol}, ${words.fractionUnit}`,
    `temperature, ${words.temperatureUnit}`,
    `pressure, ${words.pressureUnit}`,
    `offset, ${words.offsetUnit}`,
  ];
  const places = [lanes.composition, lanes.temperature, lanes.pressure, lanes.offset];
  const last = places.length - 1;
  const place = (t: number) => t + words.zoneOffset;
  const ceiling = roundUp(words.fraction(ceilingOf(picture)));
  return {
    animation: false,
    useUTC: true,
    aria: { enabled: true, label: { description: described(picture, words) } },
    textStyle: { fontFamily: chartFonts.text, color: colours.ink },
    grid: places.map(({ top, height }) => ({ left, right, top, height })),
    xAxis: places.map((_, index) => ({
      type: 'time',
      gridIndex: index,
      min: place(from),
      max: place(to),
      axisLine: { lineStyle: { color: colours.edge }, onZero: false },
      axisTick: { show: index === last },
      axisLabel: {
        show: index === last,
        color: colours.soft,
        fontFamily: chartFonts.numbers,
        fontSize: 12,
        hideOverlap: true,
        formatter: (value: number) => words.axisTime(value - words.zoneOffset),
      },
      splitLine: { show: true, lineStyle: { color: colours.line } },
      axisPointer: { label: { show: false } },
    })),
    yAxis: names.map((name, index) => ({
      type: 'value',
      gridIndex: index,
      name,
      nameTextStyle: {
        color: colours.soft,
        fontFamily: chartFonts.text,
        fontSize: 12,
        align: 'left',
        padding: [0, 0, 0, 8 - left],
      },
      nameGap: 10,
      scale: true,
      splitNumber: index === 0 ? 5 : 2,
      axisLabel: { color: colours.soft, fontFamily: chartFonts.numbers, fontSize: 12, formatter: axisNumber },
      splitLine: { lineStyle: { color: colours.line } },
      ...(index === 0 ? { min: 0, max: ceiling } : {}),
    })),
    axisPointer: { link: [{ xAxisIndex: 'all' }], lineStyle: { color: colours.soft, type: 'dotted' } },
    tooltip: {
      trigger: 'axis',
      // Rich text is drawn on the canvas: no inline style, which the page's security policy forbids.
      renderMode: 'richText',
      confine: true,
      backgroundColor: colours.sheet,
      borderColor: colours.edge,
      textStyle: { color: colours.ink, fontFamily: chartFonts.numbers, fontSize: 12 },
      formatter: (parts: TooltipPart | readonly TooltipPart[]) =>
        tooltipText(
          picture,
          words,
          (Array.isArray(parts) ? (parts[0] as TooltipPart) : (parts as TooltipPart)).axisValue -
            words.zoneOffset,
        ),
    },
    dataZoom: [
      {
        type: 'inside',
        xAxisIndex: [0, 1, 2, 3],
        filterMode: 'none',
        zoomOnMouseWheel: true,
        moveOnMouseMove: false,
        moveOnMouseWheel: false,
      },
    ],
    series: [
      bandSeries(trend, words, colours),
      qualityLine('inferred', 0, trend, words, colours),
      qualityLine('inferred, Uncertain', 1, trend, words, colours),
      limitLines(limits, words, colours),
      noteLines(trend, words, colours),
      line('temperature', 1, trend.temperature, words.temperature, words, colours.ink),
      line('pressure', 2, trend.pressure, words.pressure, words, colours.ink),
      { ...line('offset', 3, trend.offset, words.offset, words, colours.laboratory), step: 'end' },
      sampleSeries(trend, ceiling, words, colours),
    ],
  };
}

/**
 * Top of the composition lane [mol/mol]: above limit, line and believed samples. A held sample far off would press
 * everything else flat; it is drawn at the top edge with its value beside it.
 */
function ceilingOf({ trend, limits }: TrendPicture): number {
  const believed = trend.samples.filter((sample) => sample.state === 'used').map((sample) => sample.value);
  const line = Math.max(0, ...trend.inferred.value.map((value) => value ?? 0));
  const band = Math.max(0, ...trend.inferred.high.map((value) => value ?? 0));
  const all = Math.max(line, limits.high ?? 0, limits.low ?? 0, limits.target ?? 0, ...believed);
  // Nor may the wide band of the first hours, before any sample.
  return Math.max(1.1 * all, Math.min(1.05 * band, 1.5 * all), 1e-6);
}

/** A number at an axis with the decimals it needs and no more. */
function axisNumber(value: number): string {
  const decimals = (String(Number(value.toPrecision(6))).split('.')[1] ?? '').length;
  return formatNumber(value, decimals);
}

function roundUp(value: number): number {
  if (!(value > 0)) return 1;
  const step = 10 ** Math.floor(Math.log10(value)) / 2;
  return Math.ceil(value / step) * step;
}

function line(
  name: string,
  lane: number,
  series: Trend['temperature'],
  shown: (value: number) => number,
  words: TrendWords,
  colour: string,
) {
  return {
    type: 'line' as const,
    id: name,
    name,
    xAxisIndex: lane,
    yAxisIndex: lane,
    symbol: 'none',
    silent: true,
    lineStyle: { color: colour, width: 1.3 },
    itemStyle: { color: colour },
    data: series.t.map((t, i): [number, number | null] => [
      t + words.zoneOffset,
      series.value[i] == null ? null : shown(series.value[i]),
    ]),
  };
}

/** The inferred line where its quality is the given one, reaching over to the next point so that no gap shows. */
function qualityLine(name: string, quality: 0 | 1, trend: Trend, words: TrendWords, colours: ChartColours) {
  const { t, value, quality: qualities } = trend.inferred;
  const belongs = (i: number) => qualities[i] === quality;
  return {
    type: 'line' as const,
    id: name,
    name,
    symbol: 'none',
    silent: true,
    lineStyle: {
      color: quality === 0 ? colours.inferred : colours.attention,
      width: 2,
      type: quality === 0 ? ('solid' as const) : ([5, 3] as const),
    },
    itemStyle: { color: colours.inferred },
    z: 4,
    data: t.map((time, i): [number, number | null] => [
      time + words.zoneOffset,
      value[i] == null || !(belongs(i) || (belongs(i - 1) && value[i - 1] != null))
        ? null
        : words.fraction(value[i]),
    ]),
  };
}

/** What a custom series is asked to draw with. */
interface Drawing {
  coord(point: readonly [number, number]): readonly [number, number];
}

/** The band as one polygon for each stretch without a gap: two stacked lines would be sampled at different times. */
function bandSeries({ inferred }: Trend, words: TrendWords, colours: ChartColours) {
  const stretches = bandStretches(inferred);
  const first = inferred.t[0] ?? 0;
  const last = inferred.t.at(-1) ?? 0;
  return {
    type: 'custom' as const,
    id: 'band',
    name: 'band, 95 %',
    silent: true,
    z: 2,
    clip: true,
    // One datum that spans everything, so that zooming never takes it for outside.
    encode: { x: [0, 1], y: [2] },
    data: inferred.t.length === 0 ? [] : [[first + words.zoneOffset, last + words.zoneOffset, 0]],
    renderItem: (_params: unknown, drawing: Drawing) => ({
      type: 'group',
      children: stretches.map((stretch) => ({
        type: 'polygon',
        shape: {
          points: [
            ...stretch.map(({ t, high }) => drawing.coord([t + words.zoneOffset, words.fraction(high)])),
            ...[...stretch]
              .reverse()
              .map(({ t, low }) => drawing.coord([t + words.zoneOffset, words.fraction(low)])),
          ],
        },
        style: { fill: colours.band },
      })),
    }),
  };
}

/** Stretches of the band between gaps, oldest first. */
export function bandStretches({
  t,
  low,
  high,
}: Trend['inferred']): { t: number; low: number; high: number }[][] {
  const stretches: { t: number; low: number; high: number }[][] = [];
  let open: { t: number; low: number; high: number }[] | undefined;
  t.forEach((time, i) => {
    const below = low[i];
    const above = high[i];
    if (below == null || above == null) return (open = undefined);
    if (!open) stretches.push((open = []));
    open.push({ t: time, low: below, high: above });
    return open;
  });
  return stretches.filter((stretch) => stretch.length > 1);
}

function limitLines(limits: TrendPicture['limits'], words: TrendWords, colours: ChartColours) {
  const mark = (name: string, value: number | null, type: 'dashed' | 'dotted') =>
    value === null
      ? []
      : [
          {
            name,
            yAxis: words.fraction(value),
            lineStyle: { color: colours.limit, type, width: 1.5 },
            label: {
              formatter: `${name} ${words.fractionText(value)}`,
              color: colours.limit,
              fontFamily: chartFonts.text,
              fontSize: 12,
              position: 'insideEndTop' as const,
            },
          },
        ];
  return {
    type: 'line' as const,
    id: 'limits',
    name: 'limits',
    data: [],
    silent: true,
    markLine: {
      symbol: 'none',
      silent: true,
      animation: false,
      data: [
        ...mark('limit', limits.high, 'dashed'),
        ...mark('low limit', limits.low, 'dashed'),
        ...mark('target', limits.target, 'dotted'),
      ],
    },
  };
}

const longestNote = 28;

function noteLines({ notes }: Trend, words: TrendWords, colours: ChartColours) {
  return {
    type: 'line' as const,
    id: 'notes',
    name: 'notes',
    data: [],
    silent: true,
    markLine: {
      symbol: 'none',
      silent: true,
      animation: false,
      data: notes.map((note) => ({
        xAxis: note.t + words.zoneOffset,
        lineStyle: { color: colours.soft, type: 'dotted' as const, width: 1 },
        label: {
          formatter: `note: ${note.text.length > longestNote ? `${note.text.slice(0, longestNote)}…` : note.text}`,
          color: colours.soft,
          fontFamily: chartFonts.text,
          fontSize: 12,
          position: 'insideStartTop' as const,
          rotate: 90,
        },
      })),
    },
  };
}

function sampleSeries({ samples }: Trend, ceiling: number, words: TrendWords, colours: ChartColours) {
  return {
    type: 'scatter' as const,
    id: 'samples',
    name: 'laboratory',
    z: 6,
    symbolSize: 12,
    data: samples.map((sample) => {
      const { symbol, isFilled } = sampleSigns[sample.state];
      const shown = words.fraction(sample.value);
      const isOff = shown > ceiling;
      return {
        value: [sample.drawnAt + words.zoneOffset, isOff ? 0.96 * ceiling : shown],
        symbol,
        label: {
          show: isOff,
          formatter: `${words.fractionText(sample.value)} ↑`,
          position: 'right' as const,
          color: colours.laboratory,
          fontFamily: chartFonts.numbers,
          fontSize: 12,
        },
        itemStyle: {
          color: isFilled ? colours.laboratory : colours.sheet,
          borderColor: colours.laboratory,
          borderWidth: isFilled ? 0 : 2,
          borderType: sample.state === 'pending' ? ('dotted' as const) : ('solid' as const),
        },
      };
    }),
  };
}

/** How near a sample or note must be to the pointer to be told of, as a share of the time shown. */
const near = 0.01;

/** What the tooltip says of one moment, line by line. */
export function tooltipText(picture: TrendPicture, words: TrendWords, t: number): string {
  const { trend, symbol } = picture;
  const i = nearest(trend.inferred.t, t);
  const said = [words.fullTime(i < 0 ? t : trend.inferred.t[i]!)];
  if (i >= 0) {
    const value = trend.inferred.value[i];
    const low = trend.inferred.low[i];
    const high = trend.inferred.high[i];
    const quality = ['Good', 'Uncertain', 'Bad'][trend.inferred.quality[i]!];
    said.push(
      value == null
        ? `${symbol}  no value, ${quality}`
        : `${symbol}  ${words.fractionText(value)} ${words.fractionUnit}${low == null || high == null ? '' : ` (${words.fractionText(low)} to ${words.fractionText(high)})`}, ${quality}`,
    );
  }
  const at = (
    series: Trend['temperature'],
    name: string,
    shown: (value: number) => number,
    unit: string,
    decimals: number,
  ) => {
    const k = nearest(series.t, t);
    const value = k < 0 ? null : series.value[k];
    if (value != null) said.push(`${name}  ${shown(value).toFixed(decimals)} ${unit}`);
  };
  at(trend.temperature, 'temperature', words.temperature, words.temperatureUnit, 2);
  at(
    trend.pressure,
    'pressure',
    words.pressure,
    words.pressureUnit,
    words.pressureUnit.startsWith('kPa') ? 1 : 3,
  );
  at(trend.offset, 'offset', words.offset, words.offsetUnit, 2);
  const span = (picture.to - picture.from) * near;
  for (const sample of trend.samples)
    if (Math.abs(sample.drawnAt - t) <= span) {
      const sigma = sample.standardisedInnovation;
      said.push(
        `laboratory  ${words.fractionText(sample.value)} ${words.fractionUnit}, ${sample.state}${sigma === null ? '' : `, ${Math.abs(sigma).toFixed(1)} σ`}`,
      );
    }
  for (const note of trend.notes)
    if (Math.abs(note.t - t) <= span) said.push(`note by ${note.author}: ${note.text}`);
  return said.join('\n');
}

/** Position of the time nearest to t; −1 when there is none. */
function nearest(times: readonly number[], t: number): number {
  if (times.length === 0) return -1;
  let low = 0;
  let high = times.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (times[middle]! < t) low = middle + 1;
    else high = middle;
  }
  return low > 0 && t - times[low - 1]! < times[low]! - t ? low - 1 : low;
}

function described({ trend, symbol, from, to }: TrendPicture, words: TrendWords): string {
  const values = trend.inferred.value.filter((value): value is number => value !== null);
  const span = `${words.fullTime(from)} to ${words.fullTime(to)}`;
  if (values.length === 0) return `Trend of ${symbol}, ${span}: no values.`;
  const text = (value: number) => `${words.fractionText(value)} ${words.fractionUnit}`;
  const lowest = values.reduce((least, value) => Math.min(least, value), Infinity);
  const highest = values.reduce((most, value) => Math.max(most, value), -Infinity);
  return `Trend of ${symbol}, ${span}: from ${text(values[0]!)} to ${text(values.at(-1)!)}, lowest ${text(lowest)}, highest ${text(highest)}, ${trend.samples.length} laboratory samples. The table below has the newest values.`;
}
