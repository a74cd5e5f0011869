import { beforeAll, describe, expect, it, vi } from 'vitest';
import { SimulatedEquilibrium } from '../../../../fakes/historian/simulation/equilibrium';
import { dewTemperature } from '../../../../fakes/historian/simulation/saturation';
import { minute, SiteSimulation } from '../../../../fakes/historian/simulation/site';
import type { TowerSpec } from '../../../../fakes/historian/simulation/tower-spec';
import { depropaniser } from '../../../../fakes/historian/towers/depropaniser';

// Simulating and starting processes takes its time where others work too.
vi.setConfig({ testTimeout: 60_000 });

const startAt = Date.UTC(2026, 8, 1);
const hour = 60 * minute;
const day = 24 * hour;

function simulate(until: number, seed = 1, towers: readonly TowerSpec[] = [depropaniser]): SiteSimulation {
  const site = new SiteSimulation(towers, seed, startAt);
  site.advanceTo(startAt + until);
  return site;
}

/** Every number a tower left behind. */
function everything(site: SiteSimulation, tower = 0): number[] {
  const { readings, truth } = site.records[tower]!;
  return [readings, truth].flatMap((table) =>
    Array.from({ length: table.columns }, (_, column) =>
      Array.from({ length: table.length }, (_row, row) => table.at(column, row)),
    ).flat(),
  );
}

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
const deviation = (values: readonly number[]) => {
  const centre = mean(values);
  return Math.sqrt(mean(values.map((value) => (value - centre) ** 2)));
};
const rms = (values: readonly number[]) => Math.sqrt(mean(values.map((value) => value ** 2)));
const changes = (values: readonly number[], lag: number) =>
  values.slice(lag).map((value, i) => value - values[i]!);
function autocorrelation(values: readonly number[], lag: number): number {
  const centre = mean(values);
  const products = values.slice(lag).map((value, i) => (value - centre) * (values[i]! - centre));
  return mean(products) / deviation(values) ** 2;
}
function quantile(values: readonly number[], share: number): number {
  return values.toSorted((a, b) => a - b)[Math.floor(share * (values.length - 1))]!;
}

describe('a simulated site', () => {
  it('gives the same bits for the same minutes, simulated in one go, in pieces or minute by minute', () => {
    const inOneGo = everything(simulate(2 * day));
    const inPieces = new SiteSimulation([depropaniser], 1, startAt);
    for (const until of [0, 17 * minute + 12_345, day, day + 1, 2 * day]) inPieces.advanceTo(startAt + until);
    const byMinute = new SiteSimulation([depropaniser], 1, startAt);
    for (let t = startAt; t <= startAt + 2 * day; t += minute) byMinute.advanceTo(t);

    expect(inOneGo).toHaveLength((2 * 1440 + 1) * (depropaniser.instruments.length + 18));
    expect(inOneGo.every(Number.isFinite)).toBe(true);
    expect(everything(inPieces)).toEqual(inOneGo);
    expect(everything(byMinute)).toEqual(inOneGo);
  });

  it('gives other values for another seed', () => {
    const [one, other] = [everything(simulate(hour)), everything(simulate(hour, 2))];
    expect(one.filter((value, i) => value === other[i]).length).toBeLessThan(0.05 * one.length);
  });

  it('leaves a tower as it is when another one is built beside it', () => {
    const neighbour = { ...depropaniser, id: 'neighbour' };
    const pair = simulate(day, 1, [depropaniser, neighbour]);
    expect(everything(pair, 0)).toEqual(everything(simulate(day)));
    expect(everything(pair, 1)).not.toEqual(everything(pair, 0));
  });

  it('does not begin between minutes', () => {
    expect(() => new SiteSimulation([depropaniser], 1, startAt + 1)).toThrow(RangeError);
  });

  it('runs a debutaniser from data alone', () => {
    const site = simulate(4 * day, 1, [debutaniser]);
    const { truth, readings } = site.records[0]!;
    const heavy = rowsOf(truth.length).map((row) => truth.at(3, row) + truth.at(4, row));
    const temperature = rowsOf(readings.length).map((row) => readings.at(0, row));
    expect(site.worstImbalance()).toBeLessThan(1e-9);
    expect(quantile(heavy, 0.05)).toBeGreaterThan(0.003);
    expect(quantile(heavy, 0.95)).toBeLessThan(0.05);
    // Dew point of butanes with some pentanes at 5.5 bar: 49.7 °C for a like mixture (Peng-Robinson, by thermo 0.6.1).
    expect(Math.abs(mean(temperature) - 49.7)).toBeLessThan(3);
  });
});

describe('six weeks of the depropaniser', () => {
  let site: SiteSimulation;
  let rows: number[];
  const reading = (tag: string) => {
    const column = depropaniser.instruments.findIndex((instrument) => instrument.tag === tag);
    return rows.map((row) => site.records[0]!.readings.at(column, row));
  };
  const component = (id: (typeof depropaniser.components)[number], point = 0) =>
    rows.map((row) => site.records[0]!.truth.at(point * 6 + depropaniser.components.indexOf(id), row));
  /** C4+ in the vapour at the tower top [mol %]. */
  let heavy: number[];
  /** Above the top tray [Pa absolute], minute by minute: the site itself keeps only what instruments make of it. */
  let truePressure: number[];

  beforeAll(() => {
    const began = performance.now();
    site = new SiteSimulation([depropaniser], 20_260_901, startAt);
    truePressure = [];
    for (let t = startAt; t <= startAt + 42 * day; t += minute) {
      site.advanceTo(t);
      truePressure.push(site.towers[0]!.state.overheadPressure);
    }
    console.log(
      `figure: six weeks of one tower simulated in ${((performance.now() - began) / 1000).toFixed(1)} s`,
    );
    rows = rowsOf(site.records[0]!.readings.length);
    const groups = (['isobutane', 'n-butane', 'isopentane', 'n-pentane'] as const).map((id) => component(id));
    heavy = rows.map((row) => 100 * groups.reduce((sum, fractions) => sum + fractions[row]!, 0));
  }, 60_000);

  it('lose and gain no matter: what is fed is drawn or still there', () => {
    const imbalance = site.worstImbalance();
    console.log(
      `figure: worst material imbalance of a component over six weeks ${imbalance.toExponential(1)}`,
    );
    // 63,360 steps, each closing to rounding.
    expect(imbalance).toBeLessThan(1e-9);
  });

  it('have compositions that are compositions', () => {
    for (let point = 0; point < 3; point++) {
      const fractions = depropaniser.components.map((id) => component(id, point));
      for (const row of rows) {
        const sum = fractions.reduce((total, values) => total + values[row]!, 0);
        if (!(Math.abs(sum - 1) < 1e-12)) throw new Error(`row ${row} of point ${point} sums to ${sum}`);
      }
      expect(fractions.flat().every((fraction) => fraction > 0)).toBe(true);
    }
  });

  it('keep C4+ mostly between 0.5 and 3 mol % around a target of 1.5', () => {
    const inside = mean(heavy.map((value) => (value > 0.5 && value < 3 ? 1 : 0)));
    console.log(
      `figure: C4+ mean ${mean(heavy).toFixed(2)}, deviation ${deviation(heavy).toFixed(2)}, 1 % ${quantile(heavy, 0.01).toFixed(2)}, 99 % ${quantile(heavy, 0.99).toFixed(2)}, range ${quantile(heavy, 0).toFixed(2)} to ${quantile(heavy, 1).toFixed(2)} mol %`,
    );
    expect(inside).toBeGreaterThan(0.95);
    expect(Math.abs(mean(heavy) - 1.5)).toBeLessThan(0.3);
    // Off limit (2.5) now and then, or nobody would need to know.
    const offLimit = mean(heavy.map((value) => (value > 2.5 ? 1 : 0)));
    expect(offLimit).toBeGreaterThan(0.005);
    expect(offLimit).toBeLessThan(0.15);
  });

  it('move within the hour and over days, so that the last sample says little about now', () => {
    const lags = [10, 60, 240, 480, 1440];
    const correlations = lags.map((lag) => autocorrelation(heavy, lag));
    console.log(
      `figure: C4+ RMS change ${lags.map((lag) => `${rms(changes(heavy, lag)).toFixed(2)} in ${lag} min`).join(', ')} mol %`,
    );
    console.log(
      `figure: C4+ autocorrelation ${lags.map((lag, i) => `${correlations[i]!.toFixed(2)} at ${lag} min`).join(', ')}`,
    );
    expect(correlations[0]).toBeGreaterThan(0.95);
    expect(correlations[1]).toBeLessThan(0.95);
    expect(correlations[3]).toBeLessThan(0.7);
    // Holding a sample for eight hours errs by at least a fifth of the limit's margin of 1 mol %, and by most of the spread.
    expect(rms(changes(heavy, 480))).toBeGreaterThan(0.35);
    expect(rms(changes(heavy, 480)) / deviation(heavy)).toBeGreaterThan(0.75);
  });

  it('carry the same in the rundown, later and smoother', () => {
    const groups = (['isobutane', 'n-butane', 'isopentane', 'n-pentane'] as const).map((id) =>
      component(id, 1),
    );
    const rundown = rows.map((row) => 100 * groups.reduce((sum, fractions) => sum + fractions[row]!, 0));
    expect(Math.abs(mean(rundown) / mean(heavy) - 1)).toBeLessThan(0.01);
    // Each minute it comes nearer by a twelfth: the drum holds about twelve minutes of vapour, more or less as that varies.
    const toGo = heavy.slice(1).map((value, row) => value - rundown[row]!);
    const nearer = changes(rundown, 1);
    const share = mean(nearer.map((change, row) => change * toGo[row]!)) / mean(toGo.map((gap) => gap ** 2));
    expect(Math.abs(share * 12 - 1)).toBeLessThan(0.15);
    // So it looks most like the tower top of some minutes ago.
    const match = (lag: number) => rms(rundown.slice(lag).map((value, i) => value - heavy[i]!));
    const best = [0, 4, 8, 12, 16, 20, 30].reduce((lag, other) => (match(other) < match(lag) ? other : lag));
    expect(best).toBeGreaterThanOrEqual(8);
    expect(best).toBeLessThanOrEqual(16);
  });

  it('wander slowly in ethane, which moves the dew point without being what is watched', () => {
    const ethane = component('ethane').map((fraction) => fraction * 100);
    expect(autocorrelation(ethane, 480)).toBeGreaterThan(0.7);
    expect(deviation(ethane)).toBeGreaterThan(0.2);
    expect(mean(ethane)).toBeGreaterThan(1.5);
    expect(mean(ethane)).toBeLessThan(3.5);
  });

  it('show a temperature that is the true dew point, off by an offset that walks slowly, and noisy', () => {
    const model = new SimulatedEquilibrium(depropaniser.components, depropaniser.vapourInteractionPerCarbon);
    const temperature = reading('dp-overhead-temperature');
    const vapours = depropaniser.components.map((id) => component(id));
    const some = rows.filter((row) => row % 30 === 0);
    const errors = some.map((row) => {
      const y = Float64Array.from(vapours, (fractions) => fractions[row]!);
      return (
        temperature[row]! + 273.15 - dewTemperature(model, truePressure[row]!, y, Float64Array.from(y), 322)
      );
    });
    const weeks = Array.from({ length: 6 }, (_, week) => mean(errors.slice(week * 336, (week + 1) * 336)));
    console.log(
      `figure: thermometer's error week by week ${weeks.map((error) => error.toFixed(2)).join(', ')} K`,
    );
    // Starts at 0.6 K and walks 0.07 K a week: after six weeks four deviations are 0.7 K.
    expect(Math.abs(weeks[0]! - 0.6)).toBeLessThan(0.3);
    for (const error of weeks) expect(Math.abs(error - 0.6)).toBeLessThan(0.7);
    expect(weeks.slice(1).every((error, i) => Math.abs(error - weeks[i]!) < 0.3)).toBe(true);
    // Noise 0.05 K, and what the element's lag makes of the tower's own movement.
    const within = errors.map((error, i) => error - weeks[Math.min(5, Math.floor(i / 336))]!);
    expect(deviation(within)).toBeGreaterThan(0.05);
    expect(deviation(within)).toBeLessThan(0.15);
  });

  it('show a gauge pressure that needs the barometer of the day to be made absolute', () => {
    const gauge = reading('dp-overhead-pressure').map((kilopascal) => kilopascal * 1000);
    const barometer = truePressure.map((actual, row) => actual + 4000 - gauge[row]!);
    expect(Math.abs(mean(barometer) - 101_300)).toBeLessThan(1500);
    expect(deviation(barometer)).toBeGreaterThan(300);
    expect(deviation(barometer)).toBeLessThan(1500);
  });

  it('swing in pressure with the day, and fall by tens of kilopascals in a cloudburst', () => {
    const pressure = reading('dp-overhead-pressure');
    const byHour = Array.from({ length: 24 }, (_, h) =>
      mean(pressure.filter((_kilopascal, row) => Math.floor(row / 60) % 24 === h)),
    );
    const swing = Math.max(...byHour) - Math.min(...byHour);
    const fastest = Math.min(...changes(pressure, 20));
    console.log(
      `figure: pressure mean ${mean(pressure).toFixed(0)} kPa gauge, deviation ${deviation(pressure).toFixed(0)}, mean day ${swing.toFixed(0)}, largest fall in 20 min ${(-fastest).toFixed(0)} kPa`,
    );
    expect(Math.abs(mean(pressure) + 101.3 - 1700)).toBeLessThan(40);
    expect(swing).toBeGreaterThan(10);
    expect(swing).toBeLessThan(80);
    expect(fastest).toBeLessThan(-25);
    expect(fastest).toBeGreaterThan(-100);
  });

  it('keep the overhead at 48 to 52 °C for nine tenths of the time', () => {
    const temperature = reading('dp-overhead-temperature');
    expect(quantile(temperature, 0.05)).toBeGreaterThan(48);
    expect(quantile(temperature, 0.95)).toBeLessThan(52);
  });
});

function rowsOf(length: number): number[] {
  return Array.from({ length }, (_, row) => row);
}

/** A quick debutaniser: nothing but numbers differ from the depropaniser. */
const debutaniser: TowerSpec = {
  ...depropaniser,
  id: 'debutaniser',
  name: 'Debutaniser',
  components: ['propane', 'isobutane', 'n-butane', 'isopentane', 'n-pentane'],
  feed: {
    ...depropaniser.feed,
    flow: 140,
    composition: [0.02, 0.24, 0.44, 0.16, 0.14],
    compositionWander: depropaniser.feed.compositionWander.slice(1),
    temperature: 335,
  },
  column: { ...depropaniser.column, drumHoldup: 150_000 },
  pressure: {
    ...depropaniser.pressure,
    setPoint: 550_000,
    setPointMoves: { everyHours: 60, deviation: 5_000, span: 15_000 },
    floating: { perKelvin: 800, lagMinutes: 150, usualAir: 289 },
    condenser: 190_000,
    condenserDrop: 10_000,
    controller: { gain: -3e-6, integralMinutes: 20, low: 0.1, high: 1 },
    usualVapour: 216,
  },
  reboiler: { ...depropaniser.reboiler, dutyPerFeed: 33_000 },
  trayControl: {
    tray: 6,
    setPoint: 328,
    controller: { gain: -1.5, integralMinutes: 25, low: 60, high: 250 },
    reflux: 118,
  },
  operators: {
    ...depropaniser.operators,
    heavy: ['isopentane', 'n-pentane'],
    bottomsLight: 'n-butane',
    bottomsRange: [0.01, 0.06],
  },
};
