import type { Routes } from '@angular/router';
import { ClientPage } from './client-page';

/** The addresses below /client. */
const routes: Routes = [{ path: '', component: ClientPage }];
export default routes;
