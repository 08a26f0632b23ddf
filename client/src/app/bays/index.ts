import type { Routes } from '@angular/router';
import { BaysPage } from './bays-page';
import { ClimatePage } from './climate/climate-page';

/** The addresses below /bays. */
const routes: Routes = [
  { path: '', component: BaysPage },
  { path: 'climate', title: 'Climate', component: ClimatePage },
];
export default routes;
