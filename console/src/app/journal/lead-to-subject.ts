import { inject } from '@angular/core';
import { ActivatedRouteSnapshot, CanActivateFn, RedirectCommand, Router } from '@angular/router';
import { Observable, catchError, map, of } from 'rxjs';
import { EditionsClient } from '../api/editions-client';
import { FitsClient } from '../api/fits-client';

/** Editions and fits stand under their estimator, which a journal entry does not name: it is read on the way. */
export const leadToEdition: CanActivateFn = (route) => {
  const id = idOf(route);
  return leadTo(inject(EditionsClient).read(id), (estimator) => ['/estimators', estimator, 'editions', id]);
};

export const leadToFit: CanActivateFn = (route) => {
  const id = idOf(route);
  return leadTo(inject(FitsClient).read(id), (estimator) => ['/estimators', estimator, 'fits', id]);
};

function idOf(route: ActivatedRouteSnapshot): string {
  return route.paramMap.get('id') ?? '';
}

function leadTo(
  read: Observable<{ readonly estimator: string }>,
  path: (estimator: string) => string[],
): Observable<RedirectCommand> {
  const router = inject(Router);
  return read.pipe(
    map(({ estimator }) => new RedirectCommand(router.createUrlTree(path(estimator)), { replaceUrl: true })),
    catchError(() => of(new RedirectCommand(router.parseUrl('/no-such-page'), { skipLocationChange: true }))),
  );
}
