import type { Routes } from '@angular/router';
import { LoadPage } from './load-page';

/** The addresses below /load. */
const routes: Routes = [{ path: '', component: LoadPage }];
export default routes;
