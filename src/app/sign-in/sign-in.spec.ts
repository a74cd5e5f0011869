import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { Router } from '@angular/router';
import { sessionPath } from '@shared/api/session';
import { SessionStore } from '../core/session';
import { aSession, loadTestSession, provideTestCore } from '../core/testing';
import { SignIn } from './sign-in';

describe('signing in', () => {
  let fixture: ComponentFixture<SignIn>;
  let http: HttpTestingController;
  let router: Router;

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideTestCore()] });
    http = TestBed.inject(HttpTestingController);
    router = TestBed.inject(Router);
    await loadTestSession(aSession({ signedOut: true }));
    fixture = TestBed.createComponent(SignIn);
    await fixture.whenStable();
  });

  const page = () => fixture.nativeElement as HTMLElement;
  const field = (name: string) => page().querySelector<HTMLInputElement>(`input[name=${name}]`)!;

  function type(username: string, password: string): void {
    for (const [name, value] of Object.entries({ username, password })) {
      field(name).value = value;
      field(name).dispatchEvent(new Event('input'));
    }
    page().querySelector('form')?.dispatchEvent(new Event('submit'));
  }

  it('lets password managers know which field is which', () => {
    expect(field('username').autocomplete).toBe('username');
    expect(field('password').autocomplete).toBe('current-password');
    expect(field('password').type).toBe('password');
  });

  it('names the site and says that its data are invented', () => {
    expect(page().textContent).toContain('Test Site');
    expect(page().textContent).toContain('demonstration, invented data');
  });

  it('sends name and password, then goes where the person wanted to go', async () => {
    fixture.componentRef.setInput('returnUrl', '/journal?period=all');
    type('operator', 'dew-point-at-dawn');
    const request = http.expectOne({ method: 'POST', url: sessionPath });
    expect(request.request.body).toEqual({ username: 'operator', password: 'dew-point-at-dawn' });
    request.flush(aSession());
    await vi.waitFor(() => expect(router.url).toBe('/journal?period=all'));
  });

  it.each(['https://elsewhere.example/board', '//elsewhere.example', '/\\elsewhere.example', '/sign-in'])(
    'goes to the Board rather than to %s',
    async (returnUrl) => {
      fixture.componentRef.setInput('returnUrl', returnUrl);
      type('operator', 'dew-point-at-dawn');
      http.expectOne({ method: 'POST', url: sessionPath }).flush(aSession());
      await vi.waitFor(() => expect(router.url).toBe('/board'));
    },
  );

  it('announces a refusal in the server’s words and lets the password be typed again', async () => {
    type('operator', 'wrong');
    http
      .expectOne({ method: 'POST', url: sessionPath })
      .flush(
        { type: 'about:blank', title: 'Too many attempts', status: 429, detail: 'Wait 5 minutes.' },
        { status: 429, statusText: '' },
      );
    await fixture.whenStable();
    await vi.waitFor(() =>
      expect(page().querySelector('[role=alert]')?.textContent).toContain('Wait 5 minutes.'),
    );
    expect(field('password').selectionEnd).toBe('wrong'.length);
  });

  it('asks for what is missing before it bothers the server', async () => {
    type('operator', '');
    await fixture.whenStable();
    http.expectNone(sessionPath);
    expect(page().textContent).toContain('Type your password.');
  });

  it('sends once, however often the button is pressed', () => {
    type('operator', 'dew-point-at-dawn');
    type('operator', 'dew-point-at-dawn');
    http.expectOne({ method: 'POST', url: sessionPath });
  });

  it('warns while caps lock is on', async () => {
    const press = (isOn: boolean) => {
      const event = new KeyboardEvent('keydown', { key: 'a', modifierCapsLock: isOn });
      field('password').dispatchEvent(event);
    };
    press(true);
    await fixture.whenStable();
    expect(page().textContent).toContain('Caps lock is on.');
    press(false);
    await fixture.whenStable();
    expect(page().textContent).not.toContain('Caps lock is on.');
  });

  it('says why the person is here again when the session has ended', async () => {
    fixture.componentRef.setInput('expired', 'true');
    await fixture.whenStable();
    expect(page().querySelector('[role=status]')?.textContent).toContain('Your session has ended');
  });

  it('tries to reach the server again, and goes on where a session still stands', async () => {
    const session = TestBed.inject(SessionStore);
    const failed = session.load();
    http.expectOne({ method: 'GET', url: sessionPath }).error(new ProgressEvent('error'));
    await failed;
    await fixture.whenStable();
    expect(page().querySelector('[role=alert]')?.textContent).toContain('The server cannot be reached');

    page().querySelector<HTMLButtonElement>('button.again')?.click();
    http.expectOne({ method: 'GET', url: sessionPath }).flush(aSession());
    await vi.waitFor(() => expect(router.url).toBe('/board'));
  });
});
