import { HttpErrorResponse } from '@angular/common/http';
import { ErrorHandler, Injectable, inject } from '@angular/core';
import { describeFailure } from './api-error';
import { Notices } from './notices';

/** Last stop for what no screen expected: to the console for developers, and in one sentence to the person. */
@Injectable()
export class AppErrorHandler implements ErrorHandler {
  private readonly notices = inject(Notices);

  handleError(error: unknown): void {
    console.error(error);
    this.notices.warn(wordsFor(error));
  }
}

function wordsFor(error: unknown): string {
  const cause = rejectionOf(error);
  if (cause instanceof HttpErrorResponse) return describeFailure(cause).words;
  // A screen's code is fetched on demand; after an update of the server the old file names are gone.
  if (cause instanceof Error && /dynamically imported module|module script failed/i.test(cause.message))
    return 'This screen could not be loaded. Dewmark may have been updated: reload the page.';
  return 'Something went wrong on this page. Reload it; if it happens again, tell your administrator.';
}

/** Angular and the browser wrap the reason of a rejected promise. */
function rejectionOf(error: unknown): unknown {
  return error instanceof Error && 'rejection' in error ? error.rejection : error;
}
