import { TestBed } from '@angular/core/testing';
import { Preferences } from '../core/preferences';
import { loadTestSession, provideTestCore } from '../core/testing';
import { Quantities } from './quantities';

describe('quantities in the person’s units', () => {
  let quantities: Quantities;
  let preferences: Preferences;

  beforeEach(async () => {
    localStorage.clear();
    TestBed.configureTestingModule({ providers: [provideTestCore()] });
    await loadTestSession();
    quantities = TestBed.inject(Quantities);
    preferences = TestBed.inject(Preferences);
  });

  it('shows a mole fraction in mol % or ppm, fine enough for its size', () => {
    expect(quantities.fraction(0.0162)).toBe('1.62');
    expect(quantities.fraction(0.951)).toBe('95.1');
    expect(quantities.fraction(0.00042)).toBe('0.0420');
    preferences.choose({ fraction: 'ppm' });
    expect(quantities.fraction(0.00042)).toBe('420');
    expect(quantities.fractionUnit()).toBe('ppm');
  });

  it('counts pressure from the site’s air or from zero, and says which', () => {
    // 101.325 kPa is the site's barometric pressure in this test.
    expect(quantities.pressure(637_325)).toBe('536.0');
    expect(quantities.pressureUnit()).toBe('kPa gauge');
    preferences.choose({ pressure: 'bar', pressureReference: 'absolute' });
    expect(quantities.pressure(637_325)).toBe('6.373');
    expect(quantities.pressureUnit()).toBe('bar abs');
  });

  it('never takes the air off a difference of pressures', () => {
    expect(quantities.pressureChange(-40_000)).toBe('\u221240.0');
  });

  it('knows the pound per square inch (6894.757 Pa, NIST SP 811, from memory)', () => {
    preferences.choose({ pressure: 'psi', pressureReference: 'absolute' });
    expect(quantities.toPressure(6894.757)).toBeCloseTo(1, 6);
    expect(quantities.toPressure(101_325)).toBeCloseTo(14.696, 3);
  });

  it('shows temperatures in °C or °F and their differences in the same steps', () => {
    expect(quantities.temperature(273.15)).toBe('0.0');
    expect(quantities.temperatureChange(-0.8)).toBe('\u22120.8');
    expect(quantities.temperatureChangeUnit()).toBe('K');
    preferences.choose({ temperature: '°F' });
    expect(quantities.temperature(373.15)).toBe('212.0');
    expect(quantities.temperatureChange(-0.8)).toBe('\u22121.4');
  });

  it.each(['°C', '°F'] as const)('takes back what it showed in %s', (temperature) => {
    preferences.choose({ temperature });
    expect(quantities.fromTemperature(quantities.toTemperature(326.4))).toBeCloseTo(326.4, 9);
  });

  it.each([
    ['kPa', 'gauge'],
    ['bar', 'absolute'],
    ['psi', 'gauge'],
  ] as const)('takes back what it showed in %s %s', (pressure, pressureReference) => {
    preferences.choose({ pressure, pressureReference });
    expect(quantities.fromPressure(quantities.toPressure(537_000))).toBeCloseTo(537_000, 6);
  });
});
