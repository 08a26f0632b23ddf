import type { Routes } from '@angular/router';
import { OFFICE } from '@common/contract';
import { onlyFor } from '../session';
import { CalculatorPage } from './calculator/calculator-page';
import { LibraryPage } from './library-page';
import { MaterialPage } from './material-page';
import { RecipePage } from './recipe-page';

/** The addresses below /library. */
const routes: Routes = [
  { path: '', component: LibraryPage },
  { path: 'calculator', title: 'Calculator', component: CalculatorPage },
  { path: 'materials/new', title: 'A new material', canActivate: [onlyFor(OFFICE)], component: MaterialPage },
  { path: 'materials/:id', title: 'Material', component: MaterialPage },
  { path: 'recipes/:id', title: 'Recipe', component: RecipePage },
];
export default routes;
