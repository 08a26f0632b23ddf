import type { Routes } from '@angular/router';
import { SettingsPage } from './settings-page';

/** The addresses below /settings. */
const routes: Routes = [{ path: '', component: SettingsPage }];
export default routes;
