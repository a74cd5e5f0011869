import type { EChartsCoreOption } from 'echarts/core';
import type { Trend } from '@shared/api/sensors';
import { chartFonts, type ChartColours } from '../chart-colours';
import { formatNumber } from '../numbers';
import { niceScale, type NiceScale } from './nice-scale';
import { plantTicks } from './plant-ticks';
import { bandSeries } from './trend-band';
import { lanes, type TrendPicture, type TrendWords } from './trend-picture';
import { laneLine, limitLines, noteLines, qualityLine, sampleSeries } from './trend-series';
import { tooltipText } from './trend-tooltip';

/** What echarts hands to a tooltip's formatter, as far as it is used here. */
interface TooltipPart {
  readonly axisValue: number;
}

/** Room beside the picture's own stretch that may be dragged or zoomed into before more is read, in its lengths. */
const reach = 1;

/** The picture of one sensor's past: composition with its band, samples and limits; temperature, pressure and offset beneath on the same time axis. */
export function toTrendOption(
  picture: TrendPicture,
  words: TrendWords,
  colours: ChartColours,
): EChartsCoreOption {
  const { trend, from, to } = picture;
  const left = picture.isNarrow ? 50 : 64;
  const right = picture.isNarrow ? 12 : 84;
  const composition = compositionScale(picture, words);
  const shown = [
    { name: `${picture.symbol}, ${words.fractionUnit}`, place: lanes.composition, scale: composition },
    {
      name: `temperature, ${words.temperatureUnit}`,
      place: lanes.temperature,
      scale: laneScale(picture, trend.temperature, words.temperature, 3, 0.2),
    },
    {
      name: `pressure, ${words.pressureUnit}`,
      place: lanes.pressure,
      scale: laneScale(picture, trend.pressure, words.pressure, 3, 0),
    },
    {
      name: `offset, ${words.offsetUnit}`,
      place: lanes.offset,
      scale: laneScale(picture, trend.offset, words.offset, 2, 0.1),
    },
  ];
  const bottom = shown.length - 1;
  const span = to - from;
  const edges = { min: from - reach * span, max: Math.max(to, Math.min(to + reach * span, picture.latest)) };
  const ticks = plantTicks(
    edges.min,
    edges.max,
    (picture.isNarrow ? 5 : 9) * ((edges.max - edges.min) / span),
    words.zoneOffset,
  );
  return {
    animation: false,
    aria: { enabled: true, label: { description: described(picture, words) } },
    textStyle: { fontFamily: chartFonts.text, color: colours.ink },
    grid: shown.map(({ place: { top, height } }) => ({ left, right, top, height })),
    xAxis: shown.map((_, index) => ({
      type: 'time',
      gridIndex: index,
      ...edges,
      axisLine: { lineStyle: { color: colours.edge }, onZero: false },
      axisTick: { show: index === bottom, customValues: ticks },
      axisLabel: {
        show: index === bottom,
        customValues: ticks,
        color: colours.soft,
        fontFamily: chartFonts.numbers,
        fontSize: 12,
        hideOverlap: true,
        formatter: words.axisTime,
      },
      splitLine: { show: true, lineStyle: { color: colours.line } },
      axisPointer: { label: { show: false } },
    })),
    yAxis: shown.map(({ name, scale: { decimals, isEmpty, ...scale } }, index) => ({
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
      nameGap: 12,
      ...scale,
      axisLabel: {
        // Numbers beside an empty lane would be invented.
        show: !isEmpty,
        color: colours.soft,
        fontFamily: chartFonts.numbers,
        fontSize: 12,
        formatter: (value: number) => formatNumber(value, decimals),
      },
      splitLine: { lineStyle: { color: colours.line } },
    })),
    axisPointer: { link: [{ xAxisIndex: 'all' }], lineStyle: { color: colours.soft, type: 'dotted' } },
    tooltip: {
      trigger: 'axis',
      // Rich text is drawn on the canvas: no inline style, which the page's security policy forbids.
      renderMode: 'richText',
      confine: true,
      backgroundColor: colours.sheet,
      borderColor: colours.edge,
      textStyle: { color: colours.ink, fontFamily: chartFonts.numbers, fontSize: 12, lineHeight: 18 },
      formatter: (parts: TooltipPart | readonly TooltipPart[]) => {
        const [part] = [parts].flat() as readonly TooltipPart[];
        return tooltipText(picture, words, part!.axisValue);
      },
    },
    dataZoom: [
      {
        type: 'inside',
        xAxisIndex: shown.map((_, index) => index),
        startValue: from,
        endValue: to,
        filterMode: 'none',
        zoomOnMouseWheel: true,
        moveOnMouseMove: picture.canDrag,
        moveOnMouseWheel: false,
        // Each step is a redraw of four lanes.
        throttle: 30,
      },
    ],
    series: [
      bandSeries(trend, words, colours),
      qualityLine('inferred', 0, trend, words, colours),
      qualityLine('inferred, Uncertain', 1, trend, words, colours),
      limitLines(picture, words, colours),
      noteLines(picture, words, colours),
      laneLine('temperature', 1, trend.temperature, words.temperature, colours.ink),
      laneLine('pressure', 2, trend.pressure, words.pressure, colours.ink),
      { ...laneLine('offset', 3, trend.offset, words.offset, colours.laboratory), step: 'end' },
      sampleSeries(trend, composition.max, words, colours),
    ],
  };
}

/**
 * The composition lane: above limit, line and believed samples. A held sample far off would press everything else flat, and
 * so would the wide band of the first hours; they are cut at the top. An impurity is drawn from nothing, a purity near 1 is not.
 */
function compositionScale(picture: TrendPicture, words: TrendWords): NiceScale {
  const { trend, limits } = picture;
  const isShown = (t: number) => t >= picture.from && t <= picture.to;
  const seen = (values: readonly (number | null)[]) =>
    values.filter((value, i): value is number => value !== null && isShown(trend.inferred.t[i]!));
  const believed = trend.samples
    .filter((sample) => sample.state === 'used' && isShown(sample.drawnAt))
    .map((sample) => sample.value);
  const marks = [limits.high, limits.low, limits.target].filter((mark) => mark !== null);
  const all = [...seen(trend.inferred.value), ...marks, ...believed];
  if (all.length === 0) return niceScale(0, words.fraction(0.01), 6);
  const highest = largest(all);
  const lowest = smallest(all);
  // A band around 98 % is cut by what is left to 1, one around 2 % by the value itself.
  const allowance = 0.5 * Math.min(highest, Math.max(1 - highest, highest - lowest));
  const high = Math.max(
    highest + 0.1 * Math.max(highest - lowest, allowance),
    Math.min(largest([0, ...seen(trend.inferred.high)]), highest + allowance),
  );
  const isPurity = lowest > 0.6 * highest && highest > 0.5;
  const low = isPurity
    ? Math.min(lowest, Math.max(smallest([1, ...seen(trend.inferred.low)]), lowest - allowance))
    : 0;
  return niceScale(words.fraction(low), words.fraction(Math.min(high, 1)), 6);
}

function laneScale(
  { from, to }: TrendPicture,
  series: Trend['temperature'],
  shown: (value: number) => number,
  about: number,
  least: number,
): NiceScale {
  const values = series.value
    .filter((value, i): value is number => value !== null && series.t[i]! >= from && series.t[i]! <= to)
    .map(shown);
  return niceScale(smallest(values), largest(values), about, least);
}

// Not Math.max(...values): a long trend has more values than a call may have arguments.
function largest(values: readonly number[]): number {
  return values.reduce((most, value) => Math.max(most, value), -Infinity);
}

function smallest(values: readonly number[]): number {
  return values.reduce((least, value) => Math.min(least, value), Infinity);
}

function described({ trend, symbol, from, to }: TrendPicture, words: TrendWords): string {
  const values = trend.inferred.value.filter((value): value is number => value !== null);
  const stretch = `${words.fullTime(from)} to ${words.fullTime(to)}`;
  if (values.length === 0) return `Trend of ${symbol}, ${stretch}: no values.`;
  const text = (value: number) => `${words.fractionText(value)} ${words.fractionUnit}`;
  return `Trend of ${symbol}, ${stretch}: from ${text(values[0]!)} to ${text(values.at(-1)!)}, lowest ${text(smallest(values))}, highest ${text(largest(values))}, ${trend.samples.length} laboratory samples. The table below has the figures.`;
}
