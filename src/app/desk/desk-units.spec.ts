import {
  pressureSpan,
  pressureUnits,
  spanFor,
  temperatureSpan,
  temperatureUnits,
  unitLabelled,
} from './desk-units';

describe('units to type in', () => {
  const pressure = (label: string) => unitLabelled(label, pressureUnits(101_325));
  const temperature = (label: string) => unitLabelled(label, temperatureUnits);

  it('count gauge pressure from the barometric pressure of the site', () => {
    expect(pressure('kPa gauge').fromShown(0)).toBe(101_325);
    expect(pressure('kPa abs').fromShown(1700)).toBe(1_700_000);
    expect(pressure('bar gauge').fromShown(10)).toBe(1_101_325);
    expect(pressure('MPa abs').fromShown(1.7)).toBeCloseTo(1_700_000, 6);
    // NIST SP 811 (2008) appendix B: 1 psi is 6.894757 kPa.
    expect(pressure('psi abs').fromShown(100)).toBeCloseTo(689_475.7, 0);
  });

  it('know the degrees Fahrenheit of boiling and freezing water', () => {
    expect(temperature('°F').fromShown(212)).toBeCloseTo(373.15, 10);
    expect(temperature('°F').toShown(273.15)).toBeCloseTo(32, 10);
    expect(temperature('K').fromShown(300)).toBe(300);
  });

  it('come back to what was typed', () => {
    for (const unit of [...temperatureUnits, ...pressureUnits(99_000)])
      expect(unit.toShown(unit.fromShown(12.34))).toBeCloseTo(12.34, 9);
  });
});

describe('the span of a slider', () => {
  it('stays where it is while the value moves in its middle, so that nothing jumps under the hand', () => {
    const span = temperatureSpan(320);
    expect(spanFor(326, span, temperatureSpan)).toBe(span);
  });

  it('goes around the value once that has come near an end', () => {
    expect(spanFor(334, temperatureSpan(320), temperatureSpan)).toEqual({ low: 319, high: 349 });
    expect(spanFor(2e6, pressureSpan(1e6), pressureSpan)).toEqual({ low: 1.5e6, high: 2.5e6 });
  });
});
