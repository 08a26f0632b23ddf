import { DestroyRef, inject, signal, type Signal } from '@angular/core';
import { STUDIO_CLOCK } from '../ui/studio-clock';

const TICK_MS = 20_000;

/** Now in whole minutes since 1970, as a signal that keeps up. Needs an injection context. */
export function minuteTick(): Signal<number> {
  const clock = inject(STUDIO_CLOCK);
  const minute = (): number => Math.floor(clock.now() / 60_000);
  const now = signal(minute());
  const timer = setInterval(() => now.set(minute()), TICK_MS);
  inject(DestroyRef).onDestroy(() => clearInterval(timer));
  return now.asReadonly();
}
