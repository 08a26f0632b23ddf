import { Injectable } from '@angular/core';

/** The token that unsafe requests carry, apart from the session store so that the interceptor needs no store. */
@Injectable({ providedIn: 'root' })
export class FormToken {
  value = '';
}
