import { effect, signal, type Signal } from '@angular/core';
import type { AbstractControl, ValidationErrors } from '@angular/forms';

/** A control's errors as a signal, so that a field shows a fault however it came to be there. Needs an injection context. */
export function controlErrors(control: Signal<AbstractControl>): Signal<ValidationErrors | null> {
  const errors = signal<ValidationErrors | null>(null, { equal: () => false });
  effect((onCleanup) => {
    const one = control();
    errors.set(one.errors);
    const listening = one.events.subscribe(() => errors.set(one.errors));
    onCleanup(() => listening.unsubscribe());
  });
  return errors.asReadonly();
}
