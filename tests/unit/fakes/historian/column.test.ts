import { describe, expect, it, vi } from 'vitest';
import { Column, type ColumnInputs } from '../../../../fakes/historian/simulation/column';
import { SimulatedEquilibrium } from '../../../../fakes/historian/simulation/equilibrium';
import { depropaniser } from '../../../../fakes/historian/towers/depropaniser';

// Simulating and starting processes takes its time where others work too.
vi.setConfig({ testTimeout: 60_000 });

const { components, vapourInteractionPerCarbon, column: design } = depropaniser;
const n = components.length;
const z = Float64Array.from(depropaniser.feed.composition);
const pressure = 1_700_000;

const aColumn = (changes: Partial<typeof design> = {}) =>
  new Column(
    new SimulatedEquilibrium(components, vapourInteractionPerCarbon),
    { ...design, ...changes },
    z,
    pressure,
  );

const inputs = (changes: Partial<ColumnInputs> = {}): ColumnInputs => ({
  feed: 250,
  z,
  q: 1.1,
  reflux: 225,
  boilUp: 357,
  pressure,
  pressureDrop: 20_000,
  ...changes,
});

function run(column: Column, hours: number, seconds: number, given = inputs()): Column {
  for (let t = 0; t < hours * 3600; t += seconds) column.step(given, seconds);
  return column;
}

const top = (column: Column) => [...column.y.slice(0, n)];
const bottom = (column: Column) => [...column.x.slice((column.stages - 1) * n)];

describe('a column left alone', () => {
  it('comes to the same steady state whatever the step: at rest the step cancels out of the balances', () => {
    const [slow, fast] = [run(aColumn(), 72, 60), run(aColumn(), 72, 20)];
    top(slow).forEach((fraction, i) => expect(Math.abs(fraction - top(fast)[i]!)).toBeLessThan(1e-9));
    bottom(slow).forEach((fraction, i) => expect(Math.abs(fraction - bottom(fast)[i]!)).toBeLessThan(1e-9));
    slow.T.forEach((T, j) => expect(Math.abs(T - fast.T[j]!)).toBeLessThan(1e-6));
    expect(slow.worstSum).toBeLessThan(1e-9);
  });

  it('then draws of each component what it is fed', () => {
    const column = run(aColumn(), 96, 60);
    const last = bottom(column);
    z.forEach((fraction, i) => {
      const drawn = column.distillate * column.drum[i]! + column.bottoms * last[i]!;
      expect(Math.abs(drawn / (250 * fraction) - 1)).toBeLessThan(1e-8);
    });
  });

  it('then has every stage at its bubble point, each vapour as Murphree says, lighter and colder towards the top', () => {
    const column = run(aColumn(), 72, 60);
    const { model, stages } = column;
    for (let j = 0; j < stages; j++) {
      model.evaluate(column.T[j]!, pressure + (20_000 * (j + 1)) / stages, column.x, j * n, column.y, j * n);
      let sum = 0;
      for (let i = 0; i < n; i++) {
        const equilibrium = model.K[i]! * column.x[j * n + i]!;
        sum += equilibrium;
        const below = j === stages - 1 ? equilibrium : column.y[(j + 1) * n + i]!;
        const reached = j === stages - 1 ? equilibrium : below + design.efficiency * (equilibrium - below);
        expect(column.y[j * n + i]).toBeCloseTo(reached, 8);
      }
      expect(sum).toBeCloseTo(1, 8);
      if (j > 0) expect(column.T[j]!).toBeGreaterThan(column.T[j - 1]!);
    }
  });

  it('has vapour and liquid passing each other alike at total reflux, which is how Fenske counts stages', () => {
    const column = aColumn({ efficiency: 1, trays: 10, feedTray: 5 });
    // Next to nothing fed or drawn. (Not nothing: the products' compositions would then never be renewed.)
    run(column, 24 * 60, 600, inputs({ feed: 0.02, q: 1, reflux: 299.99, boilUp: 300, pressureDrop: 0 }));
    let separation = 1;
    for (let j = 0; j < column.stages; j++) {
      column.model.evaluate(column.T[j]!, pressure, column.x, j * n, column.y, j * n);
      separation *= column.model.K[1]! / column.model.K[2]!;
    }
    const reached = (column.drum[1]! / column.drum[2]!) * (bottom(column)[2]! / bottom(column)[1]!);
    // The product flows are 3e-5 of the internal ones.
    expect(Math.abs(reached / separation - 1)).toBeLessThan(1e-3);
  });
});

describe('a column in motion', () => {
  const moved = inputs({ reflux: 231 });

  it('closes its balance in every step, with any step, while it moves', () => {
    for (const seconds of [20, 60, 600]) {
      const column = run(aColumn(), 12, 60);
      for (let k = 0; k < 50; k++) {
        const before = [...z].map((_, i) => column.inventory(i));
        column.step(moved, seconds);
        const last = bottom(column);
        z.forEach((fraction, i) => {
          const drawn = column.distillate * column.drum[i]! + column.bottoms * last[i]!;
          const gained = (250 * fraction - drawn) * seconds;
          // Rounding of an inventory of some 1e5 mol.
          expect(Math.abs(column.inventory(i) - before[i]! - gained)).toBeLessThan(1e-7);
        });
      }
    }
  });

  it('keeps every fraction positive even with a step of an hour and a sudden change of everything', () => {
    const column = run(aColumn(), 12, 60);
    const other = Float64Array.from([0.05, 0.2, 0.05, 0.5, 0.1, 0.1]);
    for (let k = 0; k < 20; k++) {
      column.step(inputs({ z: other, feed: 200, reflux: 300, boilUp: 400, pressure: 1_500_000 }), 3600);
      expect(column.x.every((fraction) => fraction > 0)).toBe(true);
      expect(column.y.every((fraction) => fraction > 0)).toBe(true);
    }
  });

  it('moves with minute steps nearly as with steps of five seconds: the tower is slower than either', () => {
    const heavyAfter = (seconds: number) => {
      const column = run(aColumn(), 72, 60);
      const before = top(column)[2]!;
      run(column, 1, seconds, moved);
      return { before, after: top(column)[2]! };
    };
    const [minute, fine] = [heavyAfter(60), heavyAfter(5)];
    expect(fine.after).toBeLessThan(0.9 * fine.before);
    // First order in the step; 5 % of the change an hour after a step is less than the plant's own noise.
    expect(Math.abs(minute.after - fine.after)).toBeLessThan(0.05 * Math.abs(fine.after - fine.before));
  });

  it('answers more reflux with a purer top and a richer bottom', () => {
    const [before, after] = [run(aColumn(), 72, 60), run(run(aColumn(), 72, 60), 12, 60, moved)];
    expect(top(after)[2]!).toBeLessThan(top(before)[2]!);
    expect(bottom(after)[1]!).toBeGreaterThan(bottom(before)[1]!);
    expect(after.T[5]!).toBeLessThan(before.T[5]!);
  });
});
