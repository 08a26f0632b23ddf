import type { Routes } from '@angular/router';
import { BaysPage } from './bays-page';

/** The addresses below /bays. */
const routes: Routes = [{ path: '', component: BaysPage }];
export default routes;
