import { HttpErrorResponse, HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, throwError } from 'rxjs';
import { SessionStore } from './session-store';

/** When a session has ended, goes to sign in and comes back to the same address afterwards. */
export const signInRedirect: HttpInterceptorFn = (request, next) => {
  const router = inject(Router);
  const session = inject(SessionStore);
  return next(request).pipe(
    catchError((error: unknown) => {
      const ended = error instanceof HttpErrorResponse && error.status === 401 && !ownsItsRefusal(request.url);
      if (ended) {
        session.forget();
        void router.navigate(['/sign-in'], { queryParams: { return: router.url, ended: true } });
      }
      return throwError(() => error);
    }),
  );
};

/** The session's own calls are answered by the guard and by the sign-in screen. */
function ownsItsRefusal(url: string): boolean {
  return url === '/api/session';
}
