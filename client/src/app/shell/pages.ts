import type { Role } from '@common/contract';

/** One page of the navigation. */
export interface NavigationPage {
  readonly path: string;
  readonly name: string;
}

const OFFICE_PAGES: readonly NavigationPage[] = [
  { path: '/plan', name: 'Plan' },
  { path: '/dates', name: 'Dates' },
  { path: '/load', name: 'Load' },
  { path: '/productions', name: 'Productions' },
  { path: '/enquiries', name: 'Enquiries' },
  { path: '/crew', name: 'Crew' },
  { path: '/bays', name: 'Bays' },
  { path: '/library', name: 'Library' },
  { path: '/day-sheet', name: 'Day sheet' },
  { path: '/settings', name: 'Settings' },
];

const MAKER_PAGES: readonly NavigationPage[] = [
  { path: '/day-sheet', name: 'Day sheet' },
  { path: '/productions', name: 'Productions' },
  { path: '/crew', name: 'Crew' },
  { path: '/library', name: 'Library' },
  { path: '/bays', name: 'Bays' },
];

const CLIENT_PAGES: readonly NavigationPage[] = [{ path: '/client', name: 'Your productions' }];

/** The pages that a role may open, the most used first: a phone's foot shows the first four. */
export function pagesFor(role: Role | null): readonly NavigationPage[] {
  switch (role) {
    case 'owner':
    case 'manager':
      return OFFICE_PAGES;
    case 'maker':
      return MAKER_PAGES;
    case 'client':
      return CLIENT_PAGES;
    default:
      return [];
  }
}
