import { TestBed } from '@angular/core/testing';
import { bubblePoint, dewPoint } from '@shared/vle/equilibrium';
import { DeskState } from './desk-state';
import { caseOf, presetSlates } from './slates';

function aDesk(): DeskState {
  TestBed.configureTestingModule({ providers: [DeskState] });
  return TestBed.inject(DeskState);
}

describe('the desk', () => {
  it.each(presetSlates)('answers every question of the preset “$name”', (preset) => {
    const desk = aDesk();
    desk.open(caseOf(preset));
    for (const shown of [
      desk.bubbleAtPressure(),
      desk.dewAtPressure(),
      desk.bubbleAtTemperature(),
      desk.dewAtTemperature(),
      desk.flash(),
      desk.phases(),
      desk.product(),
      desk.targetAtPressure(),
      desk.targetAtTemperature(),
    ]) {
      expect(shown.words).toBe('');
      expect(shown.value).not.toBeNull();
      expect(shown.isOld).toBe(false);
    }
    // A preset stands on its own line, or its sliders would begin where there is no product.
    expect(desk.product().value?.clamped).toBe(false);
    expect(desk.warnings()).toEqual([]);
  });

  it('works out anew only what the temperature decides when the temperature moves', () => {
    const desk = aDesk();
    const before = desk.dewAtPressure();
    const atTemperature = desk.dewAtTemperature();
    desk.edit('temperature', desk.temperature() + 1);
    expect(desk.dewAtPressure()).toBe(before);
    expect(desk.dewAtTemperature()).not.toBe(atTemperature);
  });

  it('keeps the last good answer, marked as old, while the slate has none', () => {
    const desk = aDesk();
    const good = desk.dewAtPressure().value;
    desk.change({ rows: desk.rows().map((row) => ({ ...row, amount: 'x' })) });
    expect(desk.dewAtPressure()).toEqual({
      value: good,
      isOld: true,
      words: 'Correct the amount of ethane first.',
    });
    desk.change({ rows: caseOf(presetSlates[0]).rows });
    expect(desk.dewAtPressure().isOld).toBe(false);
  });

  it('says when a field holds no value yet, and calculates on with the last that was one', () => {
    const desk = aDesk();
    const temperature = desk.temperature();
    desk.edit('temperature', null);
    expect(desk.isUnfinished()).toBe(true);
    expect(desk.temperature()).toBe(temperature);
    desk.edit('temperature', 330);
    expect(desk.isUnfinished()).toBe(false);
  });

  it('takes mass and liquid volume for what they are in moles', () => {
    const desk = aDesk();
    const rows = [
      { id: 'propane', amount: '50', group: 'light' as const },
      { id: 'n-butane', amount: '50', group: 'heavy' as const },
    ];
    const fraction = () => {
      const mixture = desk.mixture();
      return mixture.kind === 'answered' ? mixture.value.components[0]!.fraction : NaN;
    };
    desk.change({ rows, basis: 'mass' });
    // Molar masses from standard atomic weights: C3H8 44.0956, C4H10 58.1222 g/mol.
    expect(fraction()).toBeCloseTo(58.1222 / (58.1222 + 44.0956), 5);
    desk.change({ basis: 'volume' });
    // Liquid at 60 °F by Perry 8th ed. (DIPPR 105): 11469.8 and 10053.2 mol/m³.
    expect(fraction()).toBeCloseTo(11469.8 / (11469.8 + 10053.2), 5);
    desk.change({ rows: [...rows, { id: 'methane', amount: '1', group: 'light' }] });
    expect(desk.mixture()).toHaveProperty('words', expect.stringContaining('methane is no liquid'));
  });

  it('shows the phases of the state looked at', () => {
    const desk = aDesk();
    const mixture = desk.mixture();
    if (mixture.kind === 'refused') throw new Error(mixture.words);
    desk.change({ answer: 'bubble-at-temperature' });
    const bubble = bubblePoint(mixture.value, { temperature: desk.temperature() });
    expect(desk.phases().value?.result.pressure).toBe(bubble.pressure);
    desk.change({ answer: 'dew-at-pressure' });
    const dew = dewPoint(mixture.value, { pressure: desk.pressure() });
    expect(desk.phases().value?.result.temperature).toBe(dew.temperature);
    expect(desk.phases().value?.lines.map((line) => line.liquid)).toEqual(
      dew.liquid.map((part) => part.fraction),
    );
  });

  it('has no product while one group is empty, and says what to mark', () => {
    const desk = aDesk();
    desk.change({ rows: desk.rows().map((row) => ({ ...row, group: 'light' as const })) });
    expect(desk.product().words).toContain('one as heavy');
    expect(desk.dewAtPressure().words).toBe('');
  });

  it('moves a slider’s span only when the value has come near an end and the slider is let go', () => {
    const desk = aDesk();
    const span = desk.temperatureSpan();
    desk.edit('temperature', desk.temperature() + 14.9);
    expect(desk.temperatureSpan()).toBe(span);
    desk.settle();
    expect(desk.temperatureSpan().high).toBeCloseTo(desk.temperature() + 15, 9);
  });
});
