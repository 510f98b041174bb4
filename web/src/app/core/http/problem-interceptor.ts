import type { HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, throwError } from 'rxjs';
import { SessionStore } from '../session/session-store';
import { ProblemError, toProblem } from './problem';

/** Makes every failure a ProblemError; a session that ran out leads to the sign-in and back again. */
export const problemInterceptor: HttpInterceptorFn = (request, next) => {
  const router = inject(Router);
  const session = inject(SessionStore);
  return next(request).pipe(
    catchError((thrown: unknown) => {
      const problem = toProblem(thrown);
      if (problem.code === 'not-signed-in' && session.me()) {
        session.forget();
        void router.navigate(['/sign-in'], { queryParams: { from: router.url } });
      }
      return throwError(() => new ProblemError(problem));
    }),
  );
};
