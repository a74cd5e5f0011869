import { chartFonts, type ChartColours } from '../ui/chart-colours';

/** How plots write quantities: canonical in, the person's units out. */
export interface ShownUnits {
  readonly temperature: (kelvin: number) => number;
  readonly temperatureUnit: string;
  readonly pressure: (pascal: number) => number;
  readonly pressureUnit: string;
  readonly fraction: (moleFraction: number) => number;
  readonly fractionUnit: string;
}

/** A point of a line in shown units; null breaks the line. */
export type PlotPoint = readonly [x: number, y: number | null];

/** A value axis that says what it shows, in quiet colours. */
export function plotAxis(name: string, colours: ChartColours, side: 'x' | 'y') {
  return {
    type: 'value' as const,
    name,
    scale: true,
    nameLocation: side === 'x' ? ('middle' as const) : ('end' as const),
    nameGap: side === 'x' ? 28 : 12,
    nameTextStyle: {
      color: colours.soft,
      fontFamily: chartFonts.text,
      fontSize: 12,
      align: side === 'x' ? ('center' as const) : ('left' as const),
    },
    axisLine: { show: true, lineStyle: { color: colours.edge } },
    axisTick: { show: false },
    axisLabel: { color: colours.soft, fontFamily: chartFonts.numbers, fontSize: 11, hideOverlap: true },
    splitLine: { lineStyle: { color: colours.line } },
    splitNumber: 5,
  };
}

/** What all plots of the desk have in common; `said` is read out in place of the picture. */
export function plotFrame(
  said: string,
  legend: readonly { readonly name: string; readonly is: 'line' | 'area' }[],
  colours: ChartColours,
) {
  return {
    animation: false,
    aria: { enabled: true, label: { description: said } },
    textStyle: { fontFamily: chartFonts.text, color: colours.ink },
    legend: {
      // A line's sign is its dash alone; the library would put a dot on it.
      data: legend.map(({ name, is }) =>
        is === 'line' ? { name, itemStyle: { opacity: 0 } } : { name, icon: 'rect' },
      ),
      top: 0,
      right: 12,
      itemWidth: 26,
      itemHeight: 8,
      selectedMode: false,
      textStyle: { color: colours.soft, fontFamily: chartFonts.text, fontSize: 12 },
    },
    grid: { left: 8, right: 18, top: 40, bottom: 26, outerBoundsMode: 'same' as const },
  };
}

/** A line through the points, told apart by its dash and by the word at its end. */
export function plotLine(
  name: string,
  points: readonly PlotPoint[],
  colour: string,
  dash: 'solid' | 'dashed' | 'dotted' = 'solid',
) {
  return {
    type: 'line' as const,
    id: name,
    name,
    data: points,
    symbol: 'none',
    silent: true,
    lineStyle: { color: colour, width: 2, type: dash },
    itemStyle: { color: colour },
    z: 3,
  };
}

/** One point that stands out, with a word beside it. */
export function plotPoint(name: string, point: PlotPoint | null, colours: ChartColours) {
  return {
    type: 'scatter' as const,
    id: name,
    name,
    data: point ? [point] : [],
    symbolSize: 11,
    silent: true,
    itemStyle: { color: colours.ink, borderColor: colours.sheet, borderWidth: 2 },
    label: {
      show: true,
      formatter: name,
      position: 'top' as const,
      color: colours.ink,
      fontFamily: chartFonts.text,
      fontSize: 12,
      textBorderColor: colours.sheet,
      textBorderWidth: 3,
    },
    z: 5,
  };
}
