import type { EChartsCoreOption } from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';
import { createInference } from '@shared/inference/inference';
import { bubblePoint, dewPoint } from '@shared/vle/equilibrium';
import { chartColours } from '../ui/chart-colours';
import { echarts } from '../ui/charts';
import { inferredPlot, plotCeiling, toInferredOption } from './inferred-plot';
import type { ShownUnits } from './plot-frame';
import type { Slices } from './sliced-work';
import { toTxyOption, txyPlot } from './txy-plot';

const colours = chartColours(false);
const shown: ShownUnits = {
  temperature: (kelvin) => kelvin - 273.15,
  temperatureUnit: '°C',
  pressure: (pascal) => pascal / 1000,
  pressureUnit: 'kPa abs',
  fraction: (fraction) => 100 * fraction,
  fractionUnit: 'mol %',
};

function finish<T>(work: Slices<T>): T {
  for (;;) {
    const step = work.next();
    if (step.done) return step.value;
  }
}

/** What a person would see of the option, as SVG. */
function drawn(option: EChartsCoreOption): string {
  echarts.use([SVGRenderer]);
  // jsdom has no canvas to measure text on.
  echarts.setPlatformAPI({ measureText: (text) => ({ width: 6 * text.length }) });
  const chart = echarts.init(null, null, { renderer: 'svg', ssr: true, width: 480, height: 320 });
  chart.setOption(option);
  const svg = chart.renderToSVGString();
  chart.dispose();
  return svg;
}

describe('the T–x–y plot', () => {
  const how = { method: 'peng-robinson' as const };
  const plot = finish(txyPlot(['isobutane', 'n-butane'], 680_000, how));

  it('runs from the boiling point of one pure component to that of the other, vapour above liquid', () => {
    const pure = (id: string) =>
      bubblePoint({ ...how, components: [{ id, fraction: 1 }] }, { pressure: 680_000 }).temperature;
    expect(plot.points).toHaveLength(41);
    expect(plot.points[0]!.temperature).toBeCloseTo(pure('n-butane'), 8);
    expect(plot.points.at(-1)!.temperature).toBeCloseTo(pure('isobutane'), 8);
    for (const { x, y } of plot.points.slice(1, -1)) expect(y).toBeGreaterThan(x);
    expect(plot.words).toBe('');
  });

  it('agrees with the dew point: the vapour condenses at the temperature it left the liquid', () => {
    const { temperature, y } = plot.points[10]!;
    const components = [
      { id: 'isobutane', fraction: y },
      { id: 'n-butane', fraction: 1 - y },
    ];
    expect(dewPoint({ ...how, components }, { pressure: 680_000 }).temperature).toBeCloseTo(temperature, 6);
  });

  it('says why lines stop short above the critical pressure of one', () => {
    const short = finish(txyPlot(['methane', 'n-butane'], 6e6, how));
    expect(short.points.length).toBeLessThan(41);
    expect(short.words).toContain('Choose a lower pressure');
  });

  it('is drawn with both lines named, axes with units and the present temperature across', () => {
    const svg = drawn(toTxyOption(plot, ['isobutane', 'n-butane'], 325, shown, colours));
    for (const text of [
      'bubble line',
      'dew line',
      'isobutane in n-butane, mol %',
      'temperature, °C',
      'present',
    ])
      expect(svg).toContain(text);
    expect(svg).not.toContain('NaN');
  });
});

describe('the plot of the inferred composition', () => {
  const inference = createInference({
    relation: 'dew',
    method: 'peng-robinson',
    base: [
      { id: 'propane', fraction: 0.97, group: 'light' },
      { id: 'n-butane', fraction: 0.03, group: 'heavy' },
    ],
  });
  const instruments = { thermometer: 'A', pressureTolerance: 1500 } as const;
  const plot = finish(inferredPlot(inference, 1.7e6, 0.05, instruments));

  it('runs from none of the inferred group to the ceiling, with a band', () => {
    expect(plot.points).toHaveLength(61);
    expect(plot.points[0]!.groupFraction).toBeCloseTo(0, 6);
    expect(plot.points.at(-1)!.groupFraction).toBeCloseTo(0.05, 5);
    for (const { uncertainty } of plot.points) expect(uncertainty).toBeGreaterThan(0);
  });

  it('is drawn with band, target and present point', () => {
    const present = {
      temperature: plot.points[20]!.temperature,
      groupFraction: plot.points[20]!.groupFraction,
    };
    const svg = drawn(
      toInferredOption(plot, { product: 'C4+ (heavy)', target: 0.025, present }, shown, colours),
    );
    for (const text of ['band of the instruments', 'C4+ (heavy), mol %', 'target', 'now'])
      expect(svg).toContain(text);
    expect(svg).toContain('rgb(11,110,117)');
    expect(svg).not.toContain('NaN');
  });

  it('says why there is none where the slate has no dew point', () => {
    const none = finish(inferredPlot(inference, 9e6, 0.05, instruments));
    expect(none.points).toEqual([]);
    expect(none.words).toContain('pressure');
  });

  it('keeps its ceiling while the present value moves a little, and never goes past one', () => {
    expect(plotCeiling(0.025, 0.02)).toBe(0.05);
    expect(plotCeiling(0.025, 0.03)).toBe(0.05);
    expect(plotCeiling(0.025, 0.05)).toBeCloseTo(0.1, 12);
    expect(plotCeiling(0.6, 0.9)).toBe(1);
    expect(plotCeiling(0, 0)).toBeCloseTo(1e-4, 12);
  });
});
