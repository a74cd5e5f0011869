import type { SampleState, Trend } from '@shared/api/sensors';
import { chartFonts, type ChartColours } from '../chart-colours';
import type { TrendPicture, TrendWords } from './trend-picture';

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

/** One quantity beneath the composition. */
export function laneLine(
  name: string,
  lane: number,
  series: Trend['temperature'],
  shown: (value: number) => number,
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
    data: series.t.map((t, i): [number, number | null] => {
      const value = series.value[i];
      return [t, value == null ? null : shown(value)];
    }),
  };
}

/** The inferred line where its quality is the given one, reaching over to the next point so that no gap shows. */
export function qualityLine(
  name: string,
  quality: 0 | 1,
  trend: Trend,
  words: TrendWords,
  colours: ChartColours,
) {
  const { t, value, quality: qualities } = trend.inferred;
  const isOf = (i: number) => qualities[i] === quality && value[i] != null;
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
    data: t.map((time, i): [number, number | null] => {
      const here = value[i];
      return [time, here == null || !(isOf(i) || isOf(i - 1)) ? null : words.fraction(here)];
    }),
  };
}

export function limitLines({ limits, isNarrow }: TrendPicture, words: TrendWords, colours: ChartColours) {
  const mark = (name: string, value: number | null, type: 'dashed' | 'dotted') =>
    value === null
      ? []
      : [
          {
            name,
            yAxis: words.fraction(value),
            lineStyle: { color: colours.limit, type, width: 1.5 },
            label: {
              ...onSheet(colours),
              formatter: `${name} ${words.fractionText(value)}`,
              color: colours.limit,
              // Beside the lane; where there is no room, at the old end: the new one is looked at most.
              position: isNarrow ? ('insideStartTop' as const) : ('end' as const),
            },
          },
        ];
  return {
    type: 'line' as const,
    id: 'limits',
    name: 'limits',
    data: [],
    silent: true,
    // Over the band and the line, so that the words stay readable.
    z: 5,
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

const longestNote = 24;
/** Room the words of a note take, as a share of the picture's width. */
const noteRoom = { wide: 0.24, narrow: 0.55 } as const;

/** Notes as dotted lines with their first words; where two stand close, the older one's words wait for the tooltip. */
export function noteLines(picture: TrendPicture, words: TrendWords, colours: ChartColours) {
  const { trend, from, to, isNarrow } = picture;
  const room = (isNarrow ? noteRoom.narrow : noteRoom.wide) * (to - from);
  const shown = trend.notes.filter((note) => note.t >= from && note.t <= to).sort((a, b) => a.t - b.t);
  return {
    type: 'line' as const,
    id: 'notes',
    name: 'notes',
    data: [],
    silent: true,
    z: 5,
    markLine: {
      symbol: ['none', 'triangle'],
      symbolSize: 8,
      silent: true,
      animation: false,
      data: shown.map((note, i) => {
        const isLeft = note.t + room > to;
        const next = shown[i + 1];
        const isCovered = next !== undefined && next.t - note.t < room;
        return {
          xAxis: note.t,
          lineStyle: { color: colours.soft, type: 'dotted' as const, width: 1.5 },
          label: {
            ...onSheet(colours),
            show: !isCovered,
            formatter: `note: ${shortened(note.text)}`,
            color: colours.ink,
            position: 'end' as const,
            align: isLeft ? ('right' as const) : ('left' as const),
            distance: [0, -4],
            verticalAlign: 'top' as const,
            padding: [1, 6],
          },
        };
      }),
    },
  };
}

function shortened(text: string): string {
  const line = text.replace(/\s+/g, ' ');
  return line.length > longestNote ? `${line.slice(0, longestNote).trimEnd()}…` : line;
}

/** The laboratory's results; one beyond the top is drawn at the edge with its value beside it. */
export function sampleSeries({ samples }: Trend, ceiling: number, words: TrendWords, colours: ChartColours) {
  return {
    type: 'scatter' as const,
    id: 'samples',
    name: 'laboratory',
    z: 6,
    symbolSize: 12,
    silent: true,
    data: samples.map((sample) => {
      const { symbol, isFilled } = sampleSigns[sample.state];
      const shown = words.fraction(sample.value);
      const isOff = shown > ceiling;
      return {
        value: [sample.drawnAt, isOff ? 0.96 * ceiling : shown],
        symbol,
        label: {
          ...onSheet(colours),
          show: isOff,
          formatter: `${words.fractionText(sample.value)} ↑`,
          position: 'right' as const,
          color: colours.laboratory,
          fontFamily: chartFonts.numbers,
        },
        itemStyle: {
          color: isFilled ? colours.laboratory : colours.sheet,
          borderColor: colours.laboratory,
          borderWidth: isFilled ? 0 : 2,
          borderType: sample.state === 'pending' ? ('dotted' as const) : ('solid' as const),
          opacity: 1,
        },
      };
    }),
  };
}

/** Words in the picture stand on a patch of the sheet, so that no line runs through them. */
function onSheet(colours: ChartColours) {
  return {
    fontFamily: chartFonts.text,
    fontSize: 12,
    backgroundColor: colours.sheet,
    padding: [1, 3],
    borderRadius: 2,
  };
}
