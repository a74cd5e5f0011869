import { TestBed } from '@angular/core/testing';
import type { SlateRow } from './desk-case';
import { SlateEditor } from './slate-editor';

const library = [
  { id: 'propane', name: 'propane', short: 'C3', formula: 'C3H8', normalBoilingPoint: 231 },
  { id: 'isobutane', name: 'isobutane', short: 'iC4', formula: 'C4H10', normalBoilingPoint: 261.4 },
  { id: 'n-butane', name: 'n-butane', short: 'nC4', formula: 'C4H10', normalBoilingPoint: 272.7 },
];
const slate: readonly SlateRow[] = [
  { id: 'propane', amount: '96', group: 'light' },
  { id: 'n-butane', amount: '2', group: 'heavy' },
];

async function anEditor(rows = slate) {
  const fixture = TestBed.createComponent(SlateEditor);
  fixture.componentRef.setInput('rows', rows);
  fixture.componentRef.setInput('basis', 'mole');
  fixture.componentRef.setInput('library', library);
  await fixture.whenStable();
  const page = fixture.nativeElement as HTMLElement;
  const labelled = <T extends HTMLElement>(label: string) =>
    page.querySelector<T>(`[aria-label="${label}"]`)!;
  const button = (text: string) =>
    [...page.querySelectorAll('button')].find((each) => each.textContent?.includes(text))!;
  return {
    fixture,
    page,
    labelled,
    button,
    rows: () => fixture.componentInstance.rows(),
    note: () => page.querySelector('.note')!.textContent?.trim(),
    async type(label: string, text: string) {
      const field = labelled<HTMLInputElement>(label);
      field.value = text;
      field.dispatchEvent(new Event('input'));
      await fixture.whenStable();
    },
    async click(target: HTMLElement) {
      target.click();
      await fixture.whenStable();
    },
    async paste(text: string) {
      const event = new Event('paste', { bubbles: true, cancelable: true });
      Object.assign(event, { clipboardData: { getData: () => text } });
      labelled('Amount of propane').dispatchEvent(event);
      await fixture.whenStable();
      return event.defaultPrevented;
    },
  };
}

describe('the slate editor', () => {
  it('shows each component with its abbreviation, amount and group, and the sum', async () => {
    const { page } = await anEditor();
    const lines = [...page.querySelectorAll('tbody tr')].map((line) =>
      line.querySelector('th')?.textContent?.trim(),
    );
    expect(lines).toEqual(['propane C3', 'n-butane nC4']);
    expect(page.querySelector('tfoot .num')!.textContent).toBe('98.00');
  });

  it('says that other sums than 100 are taken by proportion, and normalises when asked', async () => {
    const { note, click, button, rows } = await anEditor();
    expect(note()).toContain('proportions');
    await click(button('Normalise'));
    expect(rows().map(({ amount }) => amount)).toEqual(['97.9592', '2.04082']);
    expect(note()).toBe('');
    expect(button('Normalise').hasAttribute('disabled')).toBe(true);
  });

  it('takes an amount while it is typed and says beneath the row what is wrong with it', async () => {
    const { type, rows, labelled, page } = await anEditor();
    await type('Amount of n-butane', '4.');
    expect(rows()[1]).toEqual({ id: 'n-butane', amount: '4.', group: 'heavy' });
    await type('Amount of n-butane', '-4');
    const field = labelled('Amount of n-butane');
    expect(field.getAttribute('aria-invalid')).toBe('true');
    const fault = page.querySelector(`#${field.getAttribute('aria-describedby')}`)!;
    expect(fault.textContent).toBe('An amount cannot be negative.');
  });

  it('removes components, and asks for one when none is left', async () => {
    const { click, labelled, rows, note } = await anEditor();
    await click(labelled('Remove propane'));
    await click(labelled('Remove n-butane'));
    expect(rows()).toEqual([]);
    expect(note()).toContain('Add a component');
  });

  it('moves a component to the other group', async () => {
    const { labelled, rows, fixture } = await anEditor();
    const group = labelled<HTMLSelectElement>('Group of n-butane');
    group.value = 'light';
    group.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    expect(rows()[1]?.group).toBe('light');
  });

  it('becomes a pasted table, grouped by boiling point, and says what was left out', async () => {
    const { paste, rows, note } = await anEditor();
    expect(await paste('iC4\t95\nnC4\t4\nC6+\t1')).toBe(true);
    expect(rows()).toEqual([
      { id: 'isobutane', amount: '95', group: 'light' },
      { id: 'n-butane', amount: '4', group: 'heavy' },
    ]);
    expect(note()).toContain('“C6+” is not in the library');
  });

  it('lets a single pasted figure go into its field', async () => {
    const { paste, rows } = await anEditor();
    expect(await paste('42.5')).toBe(false);
    expect(rows()).toEqual(slate);
  });
});
