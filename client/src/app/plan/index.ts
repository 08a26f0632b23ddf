import type { Routes } from '@angular/router';

/** The addresses below /plan. */
const routes: Routes = [];
export default routes;
