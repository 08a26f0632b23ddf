import type { Routes } from '@angular/router';

/** Each feature adds its own routes here, loaded when first visited. */
export const routes: Routes = [];
