import type { Routes } from '@angular/router';
import { OFFICE } from '@common/contract';
import { onlyFor } from '../session';
import { CrewPage } from './crew-page';
import { MakerPage } from './maker-page';

/** The addresses below /crew. */
const routes: Routes = [
  { path: '', component: CrewPage },
  { path: 'new', title: 'A new maker', canActivate: [onlyFor(OFFICE)], component: MakerPage },
  { path: ':id', title: 'Maker', canActivate: [onlyFor(OFFICE)], component: MakerPage },
];
export default routes;
