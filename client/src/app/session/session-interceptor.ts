import { type HttpEvent, type HttpHandlerFn, type HttpInterceptorFn, type HttpRequest } from '@angular/common/http';
import { inject, Injector } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, from, type Observable, switchMap, throwError } from 'rxjs';
import { type ApiFailure, toApiFailure } from '../api';
import { FormToken } from './form-token';
import { SessionStore } from './session-store';

const SAFE_METHODS: readonly string[] = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Gives unsafe requests to the API the form token, turns every error into an `ApiFailure`, fetches a new token once where the
 * old went stale, and sends the person to sign in where the server knows nobody any more.
 */
export const sessionInterceptor: HttpInterceptorFn = (request, next) => {
  if (!request.url.startsWith('/api/')) {
    return next(request);
  }
  const token = inject(FormToken);
  const injector = inject(Injector);
  return send(request, next, token).pipe(
    catchError((error: unknown) => {
      const failure = toApiFailure(error);
      if (failure.kind === 'stale-form') {
        return again(request, next, token, injector);
      }
      if (failure.kind === 'not-signed-in') {
        askToSignIn(injector);
      }
      return fail(failure);
    }),
  );
};

function send(request: HttpRequest<unknown>, next: HttpHandlerFn, token: FormToken): Observable<HttpEvent<unknown>> {
  const unsafe = !SAFE_METHODS.includes(request.method);
  return next(unsafe ? request.clone({ setHeaders: { 'X-Fettle-Token': token.value } }) : request);
}

function again(
  request: HttpRequest<unknown>,
  next: HttpHandlerFn,
  token: FormToken,
  injector: Injector,
): Observable<HttpEvent<unknown>> {
  return from(injector.get(SessionStore).refresh()).pipe(
    switchMap(() => send(request, next, token)),
    catchError((error: unknown) => fail(toApiFailure(error))),
  );
}

function askToSignIn(injector: Injector): void {
  const router = injector.get(Router);
  injector.get(SessionStore).forget();
  if (!router.url.startsWith('/sign-in')) {
    void router.navigate(['/sign-in'], { queryParams: router.url === '/' ? {} : { return: router.url } });
  }
}

function fail(failure: ApiFailure): Observable<never> {
  return throwError(() => failure);
}
