import { TestBed } from '@angular/core/testing';
import { ComponentPicker } from './component-picker';

const library = [
  { id: 'propane', name: 'propane', short: 'C3', formula: 'C3H8' },
  { id: 'isobutane', name: 'isobutane', short: 'iC4', formula: 'C4H10' },
  { id: 'n-butane', name: 'n-butane', short: 'nC4', formula: 'C4H10' },
];

async function aPicker(taken: readonly string[] = []) {
  const fixture = TestBed.createComponent(ComponentPicker);
  fixture.componentRef.setInput('library', library);
  fixture.componentRef.setInput('taken', taken);
  const picked: string[] = [];
  fixture.componentInstance.picked.subscribe((id) => picked.push(id));
  await fixture.whenStable();
  const page = fixture.nativeElement as HTMLElement;
  const field = page.querySelector('input')!;
  const key = async (name: string) => {
    const keyCode = { Enter: 13, ArrowDown: 40 }[name];
    field.dispatchEvent(new KeyboardEvent('keydown', { key: name, keyCode, bubbles: true }));
    await fixture.whenStable();
  };
  return {
    picked,
    field,
    key,
    fault: () => page.querySelector('#add-component-fault')!.textContent,
    options: () => [...document.querySelectorAll('mat-option')].map((option) => option.textContent?.trim()),
    async type(text: string) {
      field.focus();
      field.value = text;
      field.dispatchEvent(new Event('focusin', { bubbles: true }));
      field.dispatchEvent(new Event('input', { bubbles: true }));
      await fixture.whenStable();
    },
  };
}

describe('the component picker', () => {
  it('offers what the text may mean, with its other names beside it', async () => {
    const { type, options } = await aPicker();
    await type('C4H10');
    expect(options()).toEqual(['isobutane iC4 · C4H10', 'n-butane nC4 · C4H10']);
  });

  it('picks by keys alone', async () => {
    const { type, key, picked, field } = await aPicker();
    await type('but');
    // The first opens the list, where typing has not done so already.
    await key('ArrowDown');
    await key('ArrowDown');
    const marked = document.getElementById(field.getAttribute('aria-activedescendant') ?? '');
    expect(marked?.textContent).toContain('n-butane');
    await key('Enter');
    expect(picked).toEqual(['n-butane']);
    expect(field.value).toBe('');
  });

  it('takes an abbreviation and Enter for enough', async () => {
    const { type, key, picked } = await aPicker();
    await type('ic4');
    await key('Enter');
    expect(picked).toEqual(['isobutane']);
  });

  it('says what to do when the text fits several or none, or stands in the slate already', async () => {
    const { type, key, picked, fault } = await aPicker(['propane']);
    await type('C4H10');
    await key('Enter');
    expect(fault()).toContain('choose one from the list');
    await type('zzz');
    await key('Enter');
    expect(fault()).toContain('names no single component');
    await type('C3');
    await key('Enter');
    expect(fault()).toBe('propane is in the slate already.');
    expect(picked).toEqual([]);
  });
});
