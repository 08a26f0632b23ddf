import type { Routes } from '@angular/router';

/** The addresses below /dates. */
const routes: Routes = [];
export default routes;
