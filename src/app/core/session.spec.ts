import { HttpClient } from '@angular/common/http';
import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { Router } from '@angular/router';
import { sessionPath } from '@shared/api/session';
import { Clock } from './clock';
import { allowed, signedIn } from './guards';
import { Notices } from './notices';
import { SessionStore } from './session';
import { aSession, loadTestSession, provideTestCore, testNow } from './testing';

function aProblem(status: number, title: string, detail: string) {
  return { type: 'about:blank', title, status, detail };
}

describe('the session', () => {
  let http: HttpTestingController;
  let session: SessionStore;
  let router: Router;

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [
        provideTestCore({
          now: () => 0,
          routes: [
            { path: 'sign-in', children: [] },
            { path: 'not-allowed', children: [] },
            { path: 'board', children: [], canActivate: [signedIn] },
            { path: 'users', children: [], canActivate: [allowed('administer')] },
          ],
        }),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    session = TestBed.inject(SessionStore);
    router = TestBed.inject(Router);
  });

  it('knows the person, what they may do, the site, and the server’s time', async () => {
    await loadTestSession(aSession({ role: 'engineer' }));
    expect(session.user()?.name).toBe('Test Person');
    expect(session.site().timeZone).toBe('America/Halifax');
    expect(session.may('setUpSensors')).toBe(true);
    expect(session.may('approve')).toBe(false);
    expect(TestBed.inject(Clock).now()).toBe(testNow);
  });

  it('keeps why it could not be read at the start', async () => {
    const loaded = session.load();
    http.expectOne(sessionPath).error(new ProgressEvent('error'));
    await loaded;
    expect(session.failure()?.title).toBe('The server cannot be reached');
    expect(session.user()).toBeNull();
  });

  it('hands on the server’s words when the password is wrong, without leaving the page', async () => {
    const outcome = session.signIn({ username: 'operator', password: 'wrong' });
    http
      .expectOne({ method: 'POST', url: sessionPath })
      .flush(aProblem(401, 'That did not match', 'Check name and password.'), {
        status: 401,
        statusText: '',
      });
    expect(await outcome).toMatchObject({ kind: 'refused', failure: { detail: 'Check name and password.' } });
    expect(router.url).toBe('/');
  });

  it('hands on the server’s words when the name is locked', async () => {
    const outcome = session.signIn({ username: 'operator', password: 'wrong' });
    http
      .expectOne({ method: 'POST', url: sessionPath })
      .flush(aProblem(429, 'Too many attempts', 'Wait 5 minutes.'), { status: 429, statusText: '' });
    expect(await outcome).toMatchObject({
      kind: 'refused',
      failure: { status: 429, detail: 'Wait 5 minutes.' },
    });
  });

  it('asks for the password again after any 401, and remembers where the person was', async () => {
    await loadTestSession();
    await router.navigateByUrl('/board?look=1');
    TestBed.inject(HttpClient)
      .get('/api/sensors')
      .subscribe({ error: () => undefined });
    http.expectOne('/api/sensors').flush(null, { status: 401, statusText: '' });
    await vi.waitFor(() => expect(router.url).toBe('/sign-in?returnUrl=%2Fboard%3Flook%3D1&expired=true'));
    expect(session.user()).toBeNull();
  });

  it('leads whoever is not signed in to the sign-in, with the way back', async () => {
    await loadTestSession(aSession({ signedOut: true }));
    await router.navigateByUrl('/board');
    expect(router.url).toBe('/sign-in?returnUrl=%2Fboard');
  });

  it('leads whoever may not see a page to the one that says so', async () => {
    await loadTestSession();
    await router.navigateByUrl('/users');
    expect(router.url).toBe('/not-allowed');
  });

  it('signs out on the server, then shows the sign-in', async () => {
    await loadTestSession();
    const done = session.signOut();
    http.expectOne({ method: 'DELETE', url: sessionPath }).flush(null, { status: 204, statusText: '' });
    await done;
    expect(session.user()).toBeNull();
    expect(router.url).toBe('/sign-in');
  });

  it('says so when signing out did not reach the server, since the session then still stands', async () => {
    await loadTestSession();
    const done = session.signOut();
    http.expectOne({ method: 'DELETE', url: sessionPath }).error(new ProgressEvent('error'));
    await done;
    expect(session.user()).not.toBeNull();
    expect(TestBed.inject(Notices).current()).toMatchObject({ urgent: true });
  });
});
