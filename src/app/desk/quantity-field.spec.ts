import { TestBed } from '@angular/core/testing';
import { pressureUnits, temperatureSpan, temperatureUnits } from './desk-units';
import { QuantityField } from './quantity-field';

async function aField(inputs: Record<string, unknown> = {}) {
  const fixture = TestBed.createComponent(QuantityField);
  const edited: (number | null)[] = [];
  fixture.componentInstance.edited.subscribe((value) => edited.push(value));
  const all = {
    name: 'Temperature',
    key: 'temperature',
    value: 323.15,
    units: temperatureUnits,
    preferredUnit: '°C',
    impossible: 'This is below absolute zero.',
    ...inputs,
  };
  for (const [name, value] of Object.entries(all)) fixture.componentRef.setInput(name, value);
  await fixture.whenStable();
  const page = fixture.nativeElement as HTMLElement;
  const find = <T extends HTMLElement>(selector: string) => page.querySelector<T>(selector)!;
  const text = () => find<HTMLInputElement>('input[type=text]');
  return {
    fixture,
    edited,
    text,
    slider: () => page.querySelector<HTMLInputElement>('input[type=range]'),
    fault: () => find('.fault').textContent,
    async type(typed: string) {
      text().value = typed;
      text().dispatchEvent(new Event('input'));
      await fixture.whenStable();
    },
    async choose(label: string) {
      const select = find<HTMLSelectElement>('select');
      select.value = label;
      select.dispatchEvent(new Event('change'));
      await fixture.whenStable();
    },
    async set(value: number) {
      fixture.componentRef.setInput('value', value);
      await fixture.whenStable();
    },
  };
}

describe('a quantity field', () => {
  it('shows the value in the preferred unit, without zeros that say nothing', async () => {
    const { text } = await aField();
    expect(text().value).toBe('50');
  });

  it('gives what was typed in canonical units, and leaves the typing alone', async () => {
    const { type, edited, text, set } = await aField();
    await type('52,30');
    expect(edited.at(-1)).toBeCloseTo(325.45, 10);
    await set(edited.at(-1)!);
    expect(text().value).toBe('52,30');
  });

  it('follows the value when it changes from elsewhere', async () => {
    const { text, set } = await aField();
    await set(324.4);
    expect(text().value).toBe('51.25');
  });

  it('shows the same value when another unit is chosen', async () => {
    const { choose, text, edited } = await aField();
    await choose('°F');
    expect(text().value).toBe('122');
    expect(edited).toEqual([]);
  });

  it('goes back to the value when a unit is chosen while what stands there is none', async () => {
    const { type, choose, text, edited } = await aField();
    await type('x');
    await choose('K');
    expect(text().value).toBe('323.15');
    expect(edited).toEqual([null, 323.15]);
  });

  it('says in words what is wrong, and gives no value then', async () => {
    const { type, edited, fault, text } = await aField();
    await type('fifty');
    expect(edited).toEqual([null]);
    expect(fault()).toContain('Write a number');
    expect(text().getAttribute('aria-invalid')).toBe('true');
    await type('-300');
    expect(edited).toEqual([null, null]);
    expect(fault()).toBe('This is below absolute zero.');
    await type('50');
    expect(edited.at(-1)).toBeCloseTo(323.15, 10);
    expect(fault()).toBe('');
  });

  it('refuses a gauge pressure below vacuum', async () => {
    const units = pressureUnits(101_325);
    const { type, fault } = await aField({
      name: 'Pressure',
      value: 1e6,
      units,
      preferredUnit: 'kPa gauge',
      impossible: 'This is below vacuum.',
    });
    await type('-102');
    expect(fault()).toBe('This is below vacuum.');
    await type('-101');
    expect(fault()).toBe('');
  });

  it('moves by a slider in steps of the shown unit', async () => {
    const { slider, edited, fixture } = await aField({ span: temperatureSpan(323.15) });
    const range = slider()!;
    expect([range.min, range.max, range.step]).toEqual(['35', '65', '0.1']);
    range.value = '51.1';
    range.dispatchEvent(new Event('input'));
    await fixture.whenStable();
    expect(edited[0]).toBeCloseTo(324.25, 10);
    expect(range.getAttribute('aria-valuetext')).toBe('50.00 °C');
  });

  it('has no slider without a span', async () => expect((await aField()).slider()).toBeNull());
});
