import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { loadTestSession, provideTestCore, testNow } from '../core/testing';
import { PlantMoment } from './plant-moment';

@Component({
  imports: [PlantMoment],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: '<app-plant-moment label="Drawn" [(moment)]="moment" />',
})
class Form {
  readonly moment = signal(testNow);
}

async function open() {
  TestBed.configureTestingModule({ providers: provideTestCore() });
  await loadTestSession();
  const fixture = TestBed.createComponent(Form);
  await fixture.whenStable();
  const page = fixture.nativeElement as HTMLElement;
  const [date, time] = [...page.querySelectorAll('input')] as [HTMLInputElement, HTMLInputElement];
  const type = async (field: HTMLInputElement, text: string) => {
    field.value = text;
    field.dispatchEvent(new Event('input'));
    await fixture.whenStable();
  };
  return { fixture, page, date, time, type, moment: () => fixture.componentInstance.moment() };
}

describe('a moment on the plant’s wall clock', () => {
  it('shows the moment it is given in the site’s zone, with the zone', async () => {
    const { page, date, time } = await open();
    expect([date.value, time.value]).toEqual(['2026-12-02', '14:07']);
    expect(page.textContent).toContain('AST');
  });

  it('turns what is typed into UTC', async () => {
    const { time, type, moment } = await open();
    await type(time, '09:30');
    expect(moment()).toBe(Date.UTC(2026, 11, 2, 13, 30));
  });

  it('leaves the field alone while a year is being typed into it', async () => {
    const { date, type, moment } = await open();
    for (const typed of ['0002-12-01', '0020-12-01', '0202-12-01']) {
      await type(date, typed);
      expect([date.value, moment()]).toEqual([typed, Number.NaN]);
    }
    await type(date, '2026-12-01');
    expect(moment()).toBe(Date.UTC(2026, 11, 1, 18, 7));
  });

  it('is no moment over a gap, and says why', async () => {
    const { page, date, time, type, moment } = await open();
    await type(date, '2026-03-08');
    await type(time, '02:30');
    expect(moment()).toBeNaN();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('never was');
  });

  it('asks which of two is meant where the clocks went back, and again for another time', async () => {
    const { fixture, page, date, time, type, moment } = await open();
    await type(date, '2026-11-01');
    await type(time, '01:30');
    expect(moment()).toBeNaN();
    const [first, second] = [...page.querySelectorAll<HTMLInputElement>('input[type=radio]')];
    expect(page.textContent).toContain('the first (ADT)');
    second!.click();
    await fixture.whenStable();
    expect(moment()).toBe(Date.UTC(2026, 10, 1, 5, 30));
    first!.click();
    await fixture.whenStable();
    expect(moment()).toBe(Date.UTC(2026, 10, 1, 4, 30));
    await type(time, '01:45');
    expect(moment()).toBeNaN();
  });

  it('knows which one it was when the moment is given', async () => {
    const { fixture, moment } = await open();
    fixture.componentInstance.moment.set(Date.UTC(2026, 10, 1, 5, 30));
    await fixture.whenStable();
    expect(moment()).toBe(Date.UTC(2026, 10, 1, 5, 30));
  });
});
