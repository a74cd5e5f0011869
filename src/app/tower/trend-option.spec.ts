import type { Trend } from '@shared/api/sensors';
import { chartColours } from '../ui/chart-colours';
import {
  bandStretches,
  toTrendOption,
  tooltipText,
  type TrendPicture,
  type TrendWords,
} from './trend-option';

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
  zoneOffset: -4 * 3_600_000,
  axisTime: String,
  fullTime: (t) => new Date(t).toISOString(),
  fractionText: (value) => (100 * value).toFixed(2),
};

function aPicture(trend = aTrend()): TrendPicture {
  return {
    trend,
    symbol: 'C4+',
    limits: { high: 0.025, low: null, target: 0.015 },
    from: start,
    to: start + 5 * minute,
    isNarrow: false,
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
    expect(text).toContain('1.20 mol % (1.10 to 1.30), Uncertain');
    expect(text).toContain('temperature  49.85 °C');
    expect(text).toContain('laboratory  1.21 mol %, used, 0.4 σ');
  });
});
