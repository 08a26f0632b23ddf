import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component, ChangeDetectionStrategy } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, type Routes } from '@angular/router';
import { OFFICE, type Role } from '@common/contract';
import { onlyFor, signedIn, signedOut } from './session-guard';
import { sessionView } from './testing/session-views';

@Component({ selector: 'fettle-blank', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Blank {}

const routes: Routes = [
  { path: 'sign-in', component: Blank, canActivate: [signedOut] },
  { path: 'unreachable', component: Blank },
  {
    path: '',
    canActivate: [signedIn],
    children: [
      { path: 'plan', component: Blank, canActivate: [onlyFor(OFFICE)] },
      { path: 'day-sheet', component: Blank },
      { path: 'client', component: Blank },
      { path: 'crew', component: Blank },
    ],
  },
];

/** Where somebody with this role ends who goes to an address; `off` is a server that gives no answer. */
async function endOf(who: Role | null | 'off', address: string): Promise<string> {
  TestBed.configureTestingModule({
    providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter(routes)],
  });
  const router = TestBed.inject(Router);
  const http = TestBed.inject(HttpTestingController);
  const going = router.navigateByUrl(address);
  await new Promise((resolve) => setTimeout(resolve));
  const asked = http.expectOne('/api/session');
  if (who === 'off') {
    asked.error(new ProgressEvent('error'));
  } else {
    asked.flush(sessionView(who));
  }
  await going;
  return router.url;
}

describe('the way in', () => {
  it.each<[Role | null | 'off', string, string]>([
    [null, '/crew?week=2', '/sign-in?return=%2Fcrew%3Fweek%3D2'],
    ['maker', '/crew', '/crew'],
    ['maker', '/plan', '/day-sheet'],
    ['client', '/plan', '/client'],
    ['owner', '/plan', '/plan'],
    ['manager', '/sign-in', '/plan'],
    [null, '/sign-in', '/sign-in'],
    ['off', '/crew', '/unreachable?return=%2Fcrew'],
  ])('leads %s from %s to %s', async (who, from, to) => {
    await expect(endOf(who, from)).resolves.toBe(to);
  });
});
