import type { Routes } from '@angular/router';

/** The addresses below /load. */
const routes: Routes = [];
export default routes;
