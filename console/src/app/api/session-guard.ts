import { HttpErrorResponse } from '@angular/common/http';
import { inject } from '@angular/core';
import { CanActivateFn, RedirectCommand, Router } from '@angular/router';
import { catchError, map, of } from 'rxjs';
import type { Role } from './contract';
import { SessionStore } from './session-store';

/** Lets signed-in people in and sends everyone else to sign in, keeping the address they asked for. */
export const signedIn: CanActivateFn = (_route, state) => {
  const router = inject(Router);
  const signIn = router.createUrlTree(['/sign-in'], { queryParams: { return: state.url } });
  return inject(SessionStore)
    .ensure()
    .pipe(
      map(() => true),
      catchError((error: unknown) => {
        if (error instanceof HttpErrorResponse && error.status === 401) return of(signIn);
        return of(new RedirectCommand(router.parseUrl('/unreachable'), { skipLocationChange: true }));
      }),
    );
};

/** Lets in whoever holds one of the roles; the service checks again, this only spares people a refusal. */
export function withRole(...roles: readonly Role[]): CanActivateFn {
  return () => {
    const router = inject(Router);
    return inject(SessionStore).holds(...roles) || router.parseUrl('/not-permitted');
  };
}
