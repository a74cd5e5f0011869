import { HttpErrorResponse, type HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { tap } from 'rxjs';
import { sessionPath } from '@shared/api/session';
import { SessionStore } from './session';

/** Any 401 means that the session has ended, except from the sign-in itself, where it means a wrong password. */
export const sessionInterceptor: HttpInterceptorFn = (request, next) => {
  if (request.url === sessionPath) return next(request);
  const session = inject(SessionStore);
  return next(request).pipe(
    tap({
      error: (error: unknown) => {
        if (error instanceof HttpErrorResponse && error.status === 401) session.expire();
      },
    }),
  );
};
