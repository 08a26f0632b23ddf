import type { Routes } from '@angular/router';
import { EnquiriesPage } from './enquiries-page';
import { EnquiryPage } from './enquiry-page';

/** The addresses below /enquiries. */
const routes: Routes = [
  { path: '', component: EnquiriesPage },
  { path: ':id', title: 'Enquiry', component: EnquiryPage },
];
export default routes;
