import type { Routes } from '@angular/router';
import { DatesPage } from './dates-page';

/** The addresses below /dates. */
const routes: Routes = [{ path: '', component: DatesPage }];
export default routes;
