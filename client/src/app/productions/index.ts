import type { Routes } from '@angular/router';
import { PiecePage } from './piece-page';
import { ProductionPage } from './production-page';
import { ProductionsPage } from './productions-page';

/** The addresses below /productions. */
const routes: Routes = [
  { path: '', component: ProductionsPage },
  { path: ':id', title: 'Production', component: ProductionPage },
  { path: ':id/pieces/:pieceId', title: 'Piece', component: PiecePage },
];
export default routes;
