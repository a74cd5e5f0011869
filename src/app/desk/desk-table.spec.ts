import { TestBed } from '@angular/core/testing';
import { DeskState } from './desk-state';
import { deskTable } from './desk-table';
import { toCsv } from './table-text';

const shown = {
  temperature: (kelvin: number) => kelvin - 273.15,
  temperatureUnit: '°C',
  pressure: (pascal: number) => pascal / 1000,
  pressureUnit: 'kPa abs',
  fraction: (fraction: number) => 100 * fraction,
  fractionUnit: 'mol %',
};

function aDesk(): DeskState {
  TestBed.configureTestingModule({ providers: [DeskState] });
  return TestBed.inject(DeskState);
}

describe('the table to copy', () => {
  it('holds what was given and found with units, method with sources, and the phases', () => {
    const desk = aDesk();
    const table = deskTable(desk.results(), shown);
    const line = (name: string) => table.find((cells) => cells[0] === name);
    expect(line('Pressure')).toEqual(['Pressure', 1720, 'kPa abs']);
    expect(line('Dew point at this pressure')?.[1]).toBeCloseTo(
      desk.dewAtPressure().value!.temperature - 273.15,
      5,
    );
    expect(String(line('Method and sources')?.[1])).toContain('Peng and Robinson');
    const phases = table.slice(table.findIndex((cells) => cells[0] === 'Component') + 1);
    expect(phases.map((cells) => cells[0])).toEqual(['ethane', 'propane', 'isobutane', 'n-butane']);
    const liquid = phases.reduce((sum, cells) => sum + Number(cells[3]), 0);
    expect(liquid).toBeCloseTo(100, 6);
  });

  it('says why a figure is missing instead of handing out an old one', () => {
    const desk = aDesk();
    desk.dewAtPressure();
    desk.edit('pressure', 20e6);
    const table = deskTable(desk.results(), shown);
    const dew = table.find((cells) => cells[0] === 'Dew point at this pressure');
    expect(String(dew?.[1])).toContain('Choose a lower pressure');
    expect(toCsv(table)).not.toMatch(/NaN|undefined/);
  });
});
