import type { Routes } from '@angular/router';
import { PlanPage } from './plan-page';

/** The addresses below /plan. */
const routes: Routes = [{ path: '', component: PlanPage }];
export default routes;
