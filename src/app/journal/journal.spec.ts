import { HttpTestingController, type TestRequest } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { Router } from '@angular/router';
import { journalPath, type JournalEntry } from '@shared/api/journal';
import { FakeEventStreams, loadTestSession, provideTestCore, testNow } from '../core/testing';
import { Journal } from './journal';

function anEntry(change: Partial<JournalEntry> = {}): JournalEntry {
  return {
    id: 7,
    t: testNow - 3_600_000,
    user: { name: 'Test Person', role: 'operator' },
    action: 'note-written',
    subject: { kind: 'note', id: '12', name: 'C4+ in propane' },
    changes: [],
    reason: 'Cloudburst, condenser cold.',
    ...change,
  };
}

describe('the Journal', () => {
  let fixture: ComponentFixture<Journal>;
  let http: HttpTestingController;
  let streams: FakeEventStreams;

  beforeEach(async () => {
    streams = new FakeEventStreams();
    TestBed.configureTestingModule({ providers: [provideTestCore({ streams })] });
    http = TestBed.inject(HttpTestingController);
    await loadTestSession();
    fixture = TestBed.createComponent(Journal);
    TestBed.tick();
  });

  const page = () => fixture.nativeElement as HTMLElement;
  const words = () => page().textContent.replace(/\s+/g, ' ');
  const press = (label: string) =>
    [...page().querySelectorAll('button')].find((button) => button.textContent.includes(label))?.click();

  function asked(): TestRequest {
    TestBed.tick();
    return http.expectOne((request) => request.url === journalPath);
  }

  async function show(items: JournalEntry[], next: string | null = null): Promise<TestRequest> {
    const request = asked();
    request.flush({ items, next });
    await fixture.whenStable();
    return request;
  }

  it('asks for the last week, and tells each entry under its day in the site’s zone', async () => {
    const request = await show([
      anEntry(),
      anEntry({
        id: 6,
        t: Date.UTC(2026, 11, 2, 3, 30),
        user: null,
        action: 'sample-used',
        subject: { kind: 'sample', id: '88', name: 'C4+ in propane' },
        changes: [{ field: 'offset', from: -0.12, to: 0.05, unit: 'K' }],
        reason: '',
      }),
    ]);
    expect(request.request.params.get('from')).toBe(String(testNow - 7 * 86_400_000));
    const days = [...page().querySelectorAll('section')].map((day) => day.textContent.replace(/\s+/g, ' '));
    expect(days[0]).toContain('Wednesday, 2 December 2026, AST');
    expect(days[0]).toContain('13:07');
    expect(days[0]).toContain('Test Person noted on C4+ in propane');
    expect(days[0]).toContain('Cloudburst, condenser cold.');
    expect(days[1]).toContain('Tuesday, 1 December 2026, AST');
    expect(days[1]).toContain('23:30');
    expect(days[1]).toContain('Dewmark used a sample for C4+ in propane');
    expect(days[1]).toMatch(/offset\s*\u22120.12.* to \s*0.05/);
  });

  it('asks for what the address says', async () => {
    await show([]);
    fixture.componentRef.setInput('kind', 'sample');
    fixture.componentRef.setInput('period', 'all');
    fixture.componentRef.setInput('search', 'butane');
    const { params } = (await show([])).request;
    expect(params.get('kind')).toBe('sample');
    expect(params.get('search')).toBe('butane');
    expect(params.has('from')).toBe(false);
    expect(words()).toContain('Nothing in the record fits this filter');
  });

  it('puts a chosen filter into the address', async () => {
    await show([anEntry()]);
    const select = page().querySelector<HTMLSelectElement>('select')!;
    select.value = 'note';
    select.dispatchEvent(new Event('change'));
    await vi.waitFor(() => expect(TestBed.inject(Router).url).toBe('/?kind=note'));
  });

  it('reads older entries when asked, until there are none', async () => {
    await show([anEntry()], '7');
    press('Older entries');
    const request = await show([anEntry({ id: 3, reason: 'An older note.' })]);
    expect(request.request.params.get('cursor')).toBe('7');
    await vi.waitFor(() => {
      TestBed.tick();
      expect(words()).toContain('An older note.');
    });
    expect(words()).toContain('Cloudburst');
    expect(words()).toContain('That is all there is');
  });

  it('reads again when something was written', async () => {
    await show([anEntry()]);
    vi.useFakeTimers();
    streams.latest.accept();
    streams.latest.send({ type: 'note', now: testNow, noteId: 13, sensorId: 'c4' });
    await vi.advanceTimersByTimeAsync(600);
    vi.useRealTimers();
    await show([anEntry({ id: 8, reason: 'A new note.' }), anEntry()]);
    expect(words()).toContain('A new note.');
  });

  it('offers new entries, rather than moving the page, to whoever reads further back', async () => {
    await show([anEntry()], '7');
    press('Older entries');
    await show([anEntry({ id: 3 })]);
    await vi.waitFor(() => expect(page().querySelectorAll('app-journal-entry-line').length).toBe(2));
    vi.useFakeTimers();
    streams.latest.accept();
    streams.latest.send({ type: 'note', now: testNow, noteId: 13, sensorId: 'c4' });
    await vi.advanceTimersByTimeAsync(600);
    vi.useRealTimers();
    await fixture.whenStable();
    expect(words()).toContain('Newer entries have come.');
    press('Show them');
    await show([anEntry({ id: 8, reason: 'A new note.' })]);
    expect(words()).toContain('A new note.');
  });

  it('says what failed and tries again when asked', async () => {
    asked().error(new ProgressEvent('error'));
    await fixture.whenStable();
    expect(words()).toContain('The journal could not be read');
    press('Try again');
    await show([anEntry()]);
    expect(words()).toContain('Cloudburst');
  });
});
