import { HttpErrorResponse } from '@angular/common/http';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { loadTestSession, provideTestCore, testNow } from '../core/testing';
import { AgeText } from './age-text';
import { BandGauge } from './band-gauge';
import { EmptyState } from './empty-state';
import { ErrorState } from './error-state';
import { LoadingState } from './loading-state';
import { QualityChip } from './quality-chip';

function text(fixture: ComponentFixture<unknown>): string {
  return (fixture.nativeElement as HTMLElement).textContent.replace(/\s+/g, ' ').trim();
}

function element(fixture: ComponentFixture<unknown>, selector: string): HTMLElement | null {
  return (fixture.nativeElement as HTMLElement).querySelector(selector);
}

describe('pieces shared by screens', () => {
  beforeEach(async () => {
    localStorage.clear();
    TestBed.configureTestingModule({ providers: [provideTestCore()] });
    await loadTestSession();
  });

  it('a quality says its word and why, and counts the reasons it has no room for', async () => {
    const fixture = TestBed.createComponent(QualityChip);
    fixture.componentRef.setInput('quality', 'Uncertain');
    fixture.componentRef.setInput('reasons', ['temperature-flat', 'not-steady', 'sample-too-old']);
    fixture.componentRef.setInput('limit', 1);
    await fixture.whenStable();
    expect(text(fixture)).toContain('Uncertain');
    expect(text(fixture)).toContain('the temperature has not moved at all');
    expect(text(fixture)).toContain('and 2 more');
    expect(text(fixture)).not.toContain('too old');
  });

  it('an age is told in hours and minutes', async () => {
    const fixture = TestBed.createComponent(AgeText);
    fixture.componentRef.setInput('since', testNow - (6 * 60 + 10) * 60_000);
    await fixture.whenStable();
    expect(text(fixture)).toBe('6 h 10 min');
  });

  it('an error says what to do and tries again when asked', async () => {
    const fixture = TestBed.createComponent(ErrorState);
    fixture.componentRef.setInput('what', 'The samples');
    fixture.componentRef.setInput('error', new HttpErrorResponse({ status: 0 }));
    let tries = 0;
    fixture.componentInstance.retry.subscribe(() => tries++);
    await fixture.whenStable();
    expect(text(fixture)).toContain('The samples could not be read');
    expect(text(fixture)).toContain('Check that this computer is on the plant network');
    element(fixture, 'button')?.click();
    expect(tries).toBe(1);
  });

  it('an empty place says why it is empty', async () => {
    const fixture = TestBed.createComponent(EmptyState);
    fixture.componentRef.setInput('title', 'No samples yet');
    fixture.componentRef.setInput('hint', 'Enter the first one.');
    await fixture.whenStable();
    expect(text(fixture)).toContain('No samples yet');
    expect(text(fixture)).toContain('Enter the first one.');
  });

  it('a place that is loading says so to those who cannot see it', async () => {
    const fixture = TestBed.createComponent(LoadingState);
    fixture.componentRef.setInput('what', 'the samples');
    await fixture.whenStable();
    expect(element(fixture, '[role=status]')?.textContent).toBe('Loading the samples');
    expect((fixture.nativeElement as HTMLElement).querySelectorAll('.shape').length).toBe(3);
  });

  it('a gauge says in words what it draws', async () => {
    const fixture = TestBed.createComponent(BandGauge);
    const inputs = { value: 0.0162, low: 0.0141, high: 0.0183, limitHigh: 0.015, target: 0.012 };
    for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
    await fixture.whenStable();
    expect(element(fixture, 'svg')?.getAttribute('aria-label')).toBe(
      '1.62 mol %, band 1.41 to 1.83, limit 1.50, target 1.20',
    );
    // 0.015 on a scale from 0 to 0.025.
    expect(element(fixture, '.limit')?.getAttribute('x1')).toBe('60%');
    expect(element(fixture, '.value')?.classList.contains('off')).toBe(true);
  });

  it('a gauge without a value draws the limit alone and says that there is no value', async () => {
    const fixture = TestBed.createComponent(BandGauge);
    const inputs = { value: null, low: null, high: null, limitHigh: 0.02 };
    for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
    await fixture.whenStable();
    expect(element(fixture, 'svg')?.getAttribute('aria-label')).toBe('no value, limit 2.00');
    expect(element(fixture, '.value')).toBeNull();
    expect(element(fixture, '.band')).toBeNull();
  });
});
