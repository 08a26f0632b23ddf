import type { Routes } from '@angular/router';
import { DaySheetPage } from './day-sheet-page';

/** The addresses below /day-sheet. */
const routes: Routes = [{ path: '', component: DaySheetPage }];
export default routes;
