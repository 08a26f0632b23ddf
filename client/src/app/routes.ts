import { inject } from '@angular/core';
import { Router, type Routes } from '@angular/router';
import { OFFICE, WORKSHOP } from '@common/contract';
import { homeOf, onlyFor, SessionStore, signedIn, signedOut } from './session';
import { NotFoundPage } from './shell/not-found-page';
import { Shell } from './shell/shell';

/** The pages of somebody who is signed in; each feature brings its own routes, loaded when first visited. */
const pages: Routes = [
  {
    path: '',
    pathMatch: 'full',
    canActivate: [() => inject(Router).parseUrl(homeOf(inject(SessionStore).role() ?? 'client'))],
    children: [],
  },
  { path: 'plan', title: 'Plan', canActivate: [onlyFor(OFFICE)], loadChildren: () => import('./plan') },
  { path: 'dates', title: 'Dates', canActivate: [onlyFor(OFFICE)], loadChildren: () => import('./dates') },
  { path: 'load', title: 'Load', canActivate: [onlyFor(OFFICE)], loadChildren: () => import('./load') },
  {
    path: 'enquiries',
    title: 'Enquiries',
    canActivate: [onlyFor(OFFICE)],
    loadChildren: () => import('./enquiries'),
  },
  {
    path: 'productions',
    title: 'Productions',
    canActivate: [onlyFor(WORKSHOP)],
    loadChildren: () => import('./productions'),
  },
  { path: 'crew', title: 'Crew', canActivate: [onlyFor(WORKSHOP)], loadChildren: () => import('./crew') },
  { path: 'bays', title: 'Bays', canActivate: [onlyFor(WORKSHOP)], loadChildren: () => import('./bays') },
  { path: 'library', title: 'Library', canActivate: [onlyFor(WORKSHOP)], loadChildren: () => import('./library') },
  { path: 'settings', title: 'Settings', canActivate: [onlyFor(OFFICE)], loadChildren: () => import('./settings') },
  {
    path: 'day-sheet',
    title: 'Day sheet',
    canActivate: [onlyFor(WORKSHOP)],
    loadChildren: () => import('./day-sheet'),
  },
  {
    path: 'client',
    title: 'Your productions',
    canActivate: [onlyFor(['client'])],
    loadChildren: () => import('./client-page'),
  },
];

/** Every address of the application. */
export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    canActivate: [signedOut],
    loadComponent: () => import('./session/sign-in-page').then((file) => file.SignInPage),
  },
  {
    path: 'unreachable',
    title: 'The studio can’t be reached',
    loadComponent: () => import('./session/unreachable-page').then((file) => file.UnreachablePage),
  },
  {
    path: '',
    component: Shell,
    canActivate: [signedIn],
    children: [...pages, { path: '**', title: 'There is nothing here', component: NotFoundPage }],
  },
];
