import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { Router } from '@angular/router';
import { roles } from '@shared/api/session';
import { sessionPath } from '@shared/api/session';
import { Notices } from '../core/notices';
import { FakeEventStreams, aSession, loadTestSession, provideTestCore, testNow } from '../core/testing';
import { entryOf, menu } from './menu';
import { Shell } from './shell';

describe('the shell', () => {
  let fixture: ComponentFixture<Shell>;
  let streams: FakeEventStreams;
  let deviceTime: number;

  async function open(role: (typeof roles)[number] = 'operator'): Promise<void> {
    localStorage.clear();
    deviceTime = testNow;
    streams = new FakeEventStreams();
    TestBed.configureTestingModule({ providers: [provideTestCore({ now: () => deviceTime, streams })] });
    await loadTestSession(aSession({ role }));
    fixture = TestBed.createComponent(Shell);
    await fixture.whenStable();
  }

  const page = () => fixture.nativeElement as HTMLElement;
  const words = (selector: string) =>
    (page().querySelector(selector)?.textContent ?? '').replace(/\s+/g, ' ').trim();
  const button = (label: string) => page().querySelector<HTMLButtonElement>(`button[aria-label="${label}"]`)!;

  it('shows the site, that its data are invented, the time with its zone, and who is signed in', async () => {
    await open();
    expect(words('.site')).toBe('Test Sitedemonstration, invented data');
    expect(words('time.clock')).toBe('14:07 AST');
    expect(words('#person-menu')).toContain('Test Person');
    expect(words('#person-menu')).toContain('signed in as operator');
  });

  it.each(roles)('shows the %s the screens of that role', async (role) => {
    await open(role);
    const labels = [...page().querySelectorAll('nav li')].map((item) => item.textContent.trim());
    expect(labels).toEqual(menu.map((entry) => entry.label));
  });

  it('marks the screen that is open, a tower counting as the Board’s', async () => {
    await open();
    await TestBed.inject(Router).navigateByUrl('/towers/depropaniser?sensor=c4');
    await fixture.whenStable();
    expect(words('nav [aria-current=page]')).toBe('Board');
  });

  it('says how long ago the server was heard of, and since when it is lost', async () => {
    await open();
    streams.latest.accept();
    streams.latest.send({ type: 'beat', now: testNow });
    await fixture.whenStable();
    expect(words('app-live-state')).toContain('live, 0 s ago');
    expect(words('app-live-state [role=status]')).toBe('');

    streams.latest.fail();
    await fixture.whenStable();
    expect(words('app-live-state')).toContain('connection lost since 14:07, trying again');
    expect(words('app-live-state [role=status]')).toBe('Connection lost, trying again.');
  });

  it('switches between day and night', async () => {
    await open();
    expect(button('Night colours').getAttribute('aria-pressed')).toBe('false');
    button('Night colours').click();
    await fixture.whenStable();
    expect(button('Night colours').getAttribute('aria-pressed')).toBe('true');
    expect(document.documentElement.getAttribute('data-theme')).toBe('night');
  });

  it('signs out', async () => {
    await open();
    page().querySelector<HTMLButtonElement>('#person-menu button')?.click();
    TestBed.inject(HttpTestingController)
      .expectOne({ method: 'DELETE', url: sessionPath })
      .flush(null, { status: 204, statusText: '' });
    await vi.waitFor(() => expect(TestBed.inject(Router).url).toBe('/sign-in'));
  });

  it('announces what failed at once, and closes it when asked', async () => {
    await open();
    TestBed.inject(Notices).warn('The note was not kept.');
    await fixture.whenStable();
    expect(words('[role=alert]')).toContain('The note was not kept.');
    button('Close this notice').click();
    await fixture.whenStable();
    expect(page().querySelector('.notice')).toBeNull();
  });

  it('leads the keyboard past the menu', async () => {
    await open();
    document.body.append(page());
    page().querySelector<HTMLAnchorElement>('.skip')?.click();
    expect(document.activeElement?.id).toBe('main');
  });
});

describe('the menu', () => {
  it('tells whose an address is, and does not take a longer name for its own', () => {
    expect(entryOf('/board')?.label).toBe('Board');
    expect(entryOf('/towers/depropaniser?sensor=x')?.label).toBe('Board');
    expect(entryOf('/journal?kind=note')?.label).toBe('Journal');
    expect(entryOf('/boardroom')).toBeUndefined();
  });
});
