import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { samplesPath, type NewSample, type Sample } from '@shared/api/samples';
import { sensorsPath, towersPath } from '@shared/api/sensors';
import { FakeEventStreams, loadTestSession, provideTestCore, testNow } from '../core/testing';
import { aSample, aSensorDetail } from '../ui/sensor-detail-fixtures';
import { Samples } from './samples';

const sensor = aSensorDetail();
const hour = 3_600_000;

class Screen {
  readonly streams = new FakeEventStreams();
  readonly http: HttpTestingController;
  readonly fixture: ComponentFixture<Samples>;
  readonly page: HTMLElement;

  private constructor() {
    this.http = TestBed.inject(HttpTestingController);
    this.fixture = TestBed.createComponent(Samples);
    this.page = this.fixture.nativeElement as HTMLElement;
  }

  static async open(items: Sample[] = [aSample()], next: string | null = null): Promise<Screen> {
    TestBed.configureTestingModule({ providers: provideTestCore() });
    await loadTestSession();
    const screen = new Screen();
    await screen.settle(items, next);
    return screen;
  }

  /** Answers what is read until nothing more is. */
  async settle(items: Sample[] = [aSample()], next: string | null = null): Promise<void> {
    for (let round = 0; round < 4; round++) {
      TestBed.tick();
      for (const read of this.http.match(towersPath))
        read.flush([{ id: 'test-tower', name: 'Test tower', description: '', sensorIds: [sensor.id] }]);
      for (const read of this.http.match(sensorsPath)) read.flush([sensor]);
      for (const read of this.http.match(`${sensorsPath}/${sensor.id}`)) read.flush(sensor);
      for (const read of this.lists()) read.flush({ items, next });
      await new Promise((resolve) => setTimeout(resolve));
    }
    TestBed.tick();
  }

  lists() {
    return this.http.match((request) => request.method === 'GET' && request.url === samplesPath);
  }

  sent() {
    return this.http.match((request) => request.method === 'POST' && request.url === samplesPath);
  }

  field(label: string): HTMLInputElement {
    const named = [...this.page.querySelectorAll('label')].find((one) => one.textContent.includes(label));
    return this.page.querySelector<HTMLInputElement>(`#${named!.htmlFor}`)!;
  }

  type(label: string, text: string): void {
    const field = this.field(label);
    field.value = text;
    field.dispatchEvent(new Event('input'));
    TestBed.tick();
  }

  typeResult(): void {
    for (const [label, text] of [
      ['ethane', '2'],
      ['propane', '96,4'],
      ['isobutane', '0.9'],
      ['n-butane', '0.6'],
    ] as const)
      this.type(`${label} (`, text);
  }

  press(text: string): void {
    [...this.page.querySelectorAll('button')].find((button) => button.textContent.trim() === text)!.click();
    TestBed.tick();
  }

  words(): string {
    return this.page.textContent.replace(/\s+/g, ' ');
  }
}

describe('entering a result', () => {
  it('has a field for each component of the slate, and leaves them in peace until something is typed', async () => {
    const screen = await Screen.open();
    expect([...screen.page.querySelectorAll('input.fraction')]).toHaveLength(4);
    expect(screen.words()).not.toContain('is missing');
  });

  it('says what the sum comes to while it is typed, and that it is normalised', async () => {
    const screen = await Screen.open();
    screen.type('propane (', '50');
    expect(screen.words()).toContain('sum to 50 %; a result must sum to between 98 and 102 %');
    screen.typeResult();
    expect(screen.words()).toContain('sum to 99.9 % and are normalised to 100 %');
    screen.type('ethane (', '-1');
    expect(screen.words()).toContain('ethane cannot be negative.');
  });

  it('sends nothing while something is wrong, and marks what is missing', async () => {
    const screen = await Screen.open();
    screen.type('propane (', '99');
    screen.press('Enter the result');
    expect(screen.sent()).toHaveLength(0);
    expect(screen.words()).toContain('ethane is missing; type 0 if the laboratory found none.');
    expect(screen.field('ethane (').getAttribute('aria-invalid')).toBe('true');
  });

  it('says that the drawing time is a proposal until somebody has set it', async () => {
    const screen = await Screen.open();
    expect(screen.words()).toContain('Proposed');
    screen.type('Time', '11:00');
    await screen.settle();
    expect(screen.words()).not.toContain('Proposed');
  });

  it('refuses a time to come', async () => {
    const screen = await Screen.open();
    screen.type('Time', '20:00');
    await screen.settle();
    expect(screen.words()).toContain('The sample cannot have been drawn in the future.');
  });

  it('goes on to the next field by Enter', async () => {
    const screen = await Screen.open();
    document.body.append(screen.page);
    screen.field('ethane (').focus();
    screen
      .field('ethane (')
      .dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true, cancelable: true }));
    expect(document.activeElement).toBe(screen.field('propane ('));
    screen.page.remove();
  });

  it('sends mole fractions and UTC, and says at once what the result changed', async () => {
    const screen = await Screen.open();
    screen.type('Time', '11:00');
    await screen.settle();
    screen.typeResult();
    screen.press('Enter the result');
    const [sent] = screen.sent();
    const body = sent!.request.body as NewSample;
    expect(body).toMatchObject({ towerId: 'test-tower', point: 'overhead', receivedAt: testNow, remark: '' });
    expect(body.drawnAt).toBe(Date.UTC(2026, 11, 2, 15));
    const sentFractions = Object.fromEntries(body.fractions.map(({ id, fraction }) => [id, fraction]));
    expect(Object.keys(sentFractions)).toEqual(['ethane', 'propane', 'isobutane', 'n-butane']);
    expect(sentFractions['propane']).toBeCloseTo(0.964, 12);
    expect(sentFractions['isobutane']).toBeCloseTo(0.009, 12);
    sent!.flush({
      sample: aSample(),
      alreadyThere: false,
      effects: [
        {
          sensorId: sensor.id,
          sensorName: sensor.name,
          before: { value: 0.0112, low: 0.0098, high: 0.0126, offset: 0.08 },
          after: { value: 0.0108, low: 0.0099, high: 0.0118, offset: 0.14 },
        },
      ],
    });
    await screen.settle();
    const effect = screen.page.querySelector('app-sample-effect')!.textContent.replace(/\s+/g, ' ');
    expect(effect).toContain('The result is used.');
    expect(effect).toContain('C4+ at 1.10 mol %, +0.4 σ from what was expected');
    expect(effect).toContain('0.98 to 1.26 mol %0.99 to 1.18 mol %');
    expect(effect).toContain('+0.08 K+0.14 K');
    expect(screen.field('propane (').value).toBe('');
  });

  it('loses nothing when the server refuses or is away', async () => {
    const screen = await Screen.open();
    screen.typeResult();
    screen.press('Enter the result');
    screen.sent()[0]!.error(new ProgressEvent('error'));
    await screen.settle();
    expect(screen.words()).toContain('The server cannot be reached.');
    expect(screen.field('propane (').value).toBe('96,4');
    expect(screen.page.querySelector('app-sample-effect')).toBeNull();
  });
});

describe('the list of results', () => {
  it('says of each its state, times, value, disagreement and what became of the offset', async () => {
    const screen = await Screen.open();
    const row = screen.page.querySelector('summary')!.textContent.replace(/\s+/g, ' ');
    for (const said of [
      'used',
      '2 Dec, 12:07 AST',
      'received 1 h later',
      'C4+',
      '1.10',
      '+0.4 σ',
      '+0.08 → +0.14',
    ])
      expect(row).toContain(said);
  });

  it('names the components lightest first', async () => {
    const screen = await Screen.open();
    const names = [...screen.page.querySelectorAll('app-sample-row tbody th')].map(
      (cell) => cell.textContent,
    );
    expect(names).toEqual(['ethane', 'propane', 'isobutane', 'n-butane']);
  });

  it('says why a result is held', async () => {
    const stateReason = 'Held: 4.1 σ above what the sensor expected.';
    const screen = await Screen.open([aSample({ state: 'held', stateReason })]);
    expect(screen.words()).toContain('why heldHeld: 4.1 σ above what the sensor expected.');
  });

  it('puts older results beneath', async () => {
    const screen = await Screen.open([aSample()], 'more');
    screen.press('Older');
    const [read] = screen.lists();
    expect(read!.request.params.get('cursor')).toBe('more');
    read!.flush({ items: [aSample({ id: 4, drawnAt: testNow - 9 * hour })], next: null });
    await screen.settle();
    expect(screen.page.querySelectorAll('app-sample-row')).toHaveLength(2);
    expect(screen.words()).not.toContain('Older');
  });

  it('keeps what it has when it cannot be read again, and says so', async () => {
    const screen = await Screen.open();
    (screen.fixture.componentInstance as unknown as { readAgain(): void }).readAgain();
    TestBed.tick();
    screen.lists()[0]!.flush(null, { status: 503, statusText: 'Service Unavailable' });
    await new Promise((resolve) => setTimeout(resolve));
    TestBed.tick();
    expect(screen.words()).toContain('The list could not be read again.');
    expect(screen.page.querySelectorAll('app-sample-row')).toHaveLength(1);
  });
});
