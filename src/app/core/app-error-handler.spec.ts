import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { AppErrorHandler } from './app-error-handler';
import { Notices } from './notices';

describe('what no screen expected', () => {
  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [AppErrorHandler] });
    vi.spyOn(console, 'error').mockImplementation(() => undefined);
  });
  afterEach(() => vi.restoreAllMocks());

  function told(error: unknown): string | undefined {
    TestBed.inject(AppErrorHandler).handleError(error);
    expect(console.error).toHaveBeenCalledWith(error);
    const notice = TestBed.inject(Notices).current();
    expect(notice?.urgent).toBe(true);
    return notice?.text;
  }

  it('asks for a reload when a screen’s code has gone with an update', () => {
    expect(told(new TypeError('Failed to fetch dynamically imported module: /chunk-1.js'))).toContain(
      'Dewmark may have been updated: reload the page.',
    );
  });

  it('passes on the server’s words for a request nobody caught, also out of a rejected promise', () => {
    const answer = new HttpErrorResponse({
      status: 503,
      error: { type: 'about:blank', title: 'Busy', status: 503, detail: 'Try again in a minute.' },
    });
    expect(told(answer)).toBe('Try again in a minute.');
    expect(told(Object.assign(new Error('Uncaught (in promise)'), { rejection: answer }))).toBe(
      'Try again in a minute.',
    );
  });

  it('says what to do about a fault of our own, without its details', () => {
    const text = told(new Error('undefined is not a function'));
    expect(text).toContain('Reload it');
    expect(text).not.toContain('undefined');
  });
});
