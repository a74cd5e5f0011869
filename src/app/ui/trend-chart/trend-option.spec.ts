import type { Trend } from '@shared/api/sensors';
import { chartColours } from '../chart-colours';
import { bandStretches } from './trend-band';
import { toTrendOption } from './trend-option';
import type { TrendPicture, TrendWords } from './trend-picture';
import { tooltipText } from './trend-tooltip';

const minute = 60_000;
const start = Date.UTC(2026, 10, 20, 12);

function aTrend(change: Partial<Trend> = {}): Trend {
  const t = [0, 1, 2, 3, 4].map((i) => start + i * minute);
  return {
    sensorId: 'tower-overhead',
    from: start,
    to: start + 5 * minute,
    bucketMinutes: 1,
    inferred: {
      t,
      value: [0.01, 0.011, null, 0.012, 0.013],
      low: [0.009, 0.01, null, 0.011, 0.012],
      high: [0.011, 0.012, null, 0.013, 0.014],
      quality: [0, 0, 2, 1, 0],
    },
    rundown: { t, value: [0.01, 0.01, 0.01, 0.01, 0.01] },
    temperature: { t, value: [323, 323, 323, 323, 323] },
    pressure: { t, value: [1.7e6, 1.7e6, 1.7e6, 1.7e6, 1.7e6] },
    offset: { t, value: [0.1, 0.1, 0.1, 0.1, 0.1] },
    samples: [],
    notes: [],
    ...change,
  };
}

const words: TrendWords = {
  fraction: (value) => 100 * value,
  fractionUnit: 'mol %',
  temperature: (value) => value - 273.15,
  temperatureUnit: '°C',
  pressure: (value) => value / 1000,
  pressureUnit: 'kPa abs',
  offset: (value) => value,
  offsetUnit: 'K',
  zoneOffset: () => -4 * 3_600_000,
  axisTime: String,
  fullTime: (t) => new Date(t).toISOString(),
  fractionText: (value) => (100 * value).toFixed(2),
  temperatureText: (kelvin) => (kelvin - 273.15).toFixed(2),
  pressureText: (pascal) => (pascal / 1000).toFixed(1),
  offsetText: (value) => value.toFixed(2),
};

function aPicture(trend = aTrend()): TrendPicture {
  return {
    trend,
    symbol: 'C4+',
    limits: { high: 0.025, low: null, target: 0.015 },
    from: start,
    to: start + 5 * minute,
    latest: start + 5 * minute,
    isNarrow: false,
    canDrag: true,
  };
}

interface Series {
  readonly id: string;
  readonly data: readonly unknown[];
}

function seriesOf(picture: TrendPicture): Series[] {
  return toTrendOption(picture, words, chartColours(false))['series'] as Series[];
}

describe('the trend', () => {
  it('draws a minute without a value as a gap, in line and band', () => {
    const line = seriesOf(aPicture()).find((series) => series.id === 'inferred')!;
    expect((line.data[2] as number[])[1]).toBeNull();
    expect(bandStretches(aTrend().inferred).map((stretch) => stretch.length)).toEqual([2, 2]);
  });

  it('draws an Uncertain stretch by its own line, joined to the next point', () => {
    const uncertain = seriesOf(aPicture()).find((series) => series.id === 'inferred, Uncertain')!;
    expect(uncertain.data.map((point) => (point as (number | null)[])[1] !== null)).toEqual([
      false,
      false,
      false,
      true,
      true,
    ]);
  });

  it('draws a held sample far off at the top edge with its value, so that it presses nothing flat', () => {
    const held = {
      id: 1,
      drawnAt: start + minute,
      value: 0.09,
      state: 'held' as const,
      standardisedInnovation: 40,
    };
    const picture = aPicture(aTrend({ samples: [held] }));
    const [axis] = toTrendOption(picture, words, chartColours(false))['yAxis'] as { max: number }[];
    const [drawn] = seriesOf(picture).find((series) => series.id === 'samples')!.data as {
      value: number[];
      label: { show: boolean; formatter: string };
    }[];
    expect(axis!.max).toBeLessThan(4);
    expect(drawn!.value[1]).toBeLessThan(axis!.max);
    expect(drawn!.label).toMatchObject({ show: true, formatter: '9.00 ↑' });
  });

  it('names every axis with its unit', () => {
    const axes = toTrendOption(aPicture(), words, chartColours(true))['yAxis'] as { name: string }[];
    expect(axes.map((axis) => axis.name)).toEqual([
      'C4+, mol %',
      'temperature, °C',
      'pressure, kPa abs',
      'offset, K',
    ]);
  });

  it('says of a moment its value, band, quality, readings, and the sample drawn then', () => {
    const used = {
      id: 1,
      drawnAt: start + 3 * minute,
      value: 0.0121,
      state: 'used' as const,
      standardisedInnovation: -0.4,
    };
    const text = tooltipText(aPicture(aTrend({ samples: [used] })), words, start + 3 * minute);
    expect(text).toContain('1.20 mol %, Uncertain\nband  1.10 to 1.30');
    expect(text).toContain('temperature  49.85 °C');
    expect(text).toContain('laboratory  1.21 mol %, used, 0.4 σ');
  });

  it('draws an impurity from nothing, and a purity near 1 by what is left to it', () => {
    const scaleOf = (picture: TrendPicture) =>
      (toTrendOption(picture, words, chartColours(false))['yAxis'] as { min: number; max: number }[])[0]!;
    expect(scaleOf(aPicture()).min).toBe(0);
    const { inferred } = aTrend();
    const pure = aTrend({
      inferred: {
        ...inferred,
        value: [0.962, 0.963, null, 0.961, 0.964],
        low: [0.958, 0.959, null, 0.957, 0.96],
        high: [0.966, 0.967, null, 0.965, 0.968],
      },
    });
    const { min, max } = scaleOf({ ...aPicture(pure), limits: { high: null, low: 0.95, target: null } });
    expect(min).toBeGreaterThan(90);
    expect(min).toBeLessThanOrEqual(95);
    expect(max).toBeLessThanOrEqual(100);
  });

  it('tells the states of samples apart by shape', () => {
    const samples = (['used', 'held', 'rejected', 'pending'] as const).map((state, id) => ({
      id,
      drawnAt: start + id * minute,
      value: 0.012,
      state,
      standardisedInnovation: null,
    }));
    const drawn = seriesOf(aPicture(aTrend({ samples }))).find((series) => series.id === 'samples')!.data as {
      symbol: string;
      itemStyle: { borderWidth: number; borderType: string };
    }[];
    const shapes = drawn.map(({ symbol, itemStyle }) =>
      [symbol, itemStyle.borderWidth, itemStyle.borderType].join(' '),
    );
    expect(new Set(shapes).size).toBe(4);
  });

  it('writes a note beside its line, on the side where there is room, and not over the next one', () => {
    const note = (id: number, at: number) => ({
      id,
      t: start + at * minute,
      text: 'Feed changed',
      author: 'A',
    });
    const { markLine } = seriesOf(aPicture(aTrend({ notes: [note(1, 0.2), note(2, 1), note(3, 4.9)] }))).find(
      (series) => series.id === 'notes',
    ) as unknown as {
      markLine: { data: { label: { show: boolean; align: string } }[] };
    };
    expect(markLine.data.map(({ label }) => [label.show, label.align])).toEqual([
      [false, 'left'],
      [true, 'left'],
      [true, 'right'],
    ]);
  });

  it('can be dragged back by its own length, and not beyond now', () => {
    const option = toTrendOption(aPicture(), words, chartColours(false));
    const [axis] = option['xAxis'] as { min: number; max: number }[];
    expect(axis).toMatchObject({ min: start - 5 * minute, max: start + 5 * minute });
    expect(option['dataZoom']).toMatchObject([{ startValue: start, endValue: start + 5 * minute }]);
  });
});
