import { InjectionToken, type Signal, signal } from '@angular/core';

/** The zones in which times are told: the studio's, and the viewer's where it differs. */
export interface StudioClock {
  /** The studio's IANA zone. */
  readonly zone: Signal<string>;
  /** The IANA zone of the viewer's own device. */
  readonly viewerZone: string;
  /** Now, in milliseconds since 1970. */
  readonly now: () => number;
}

/** The clock that pipes and parts tell time by; the application gives it the studio's zone. */
export const STUDIO_CLOCK = new InjectionToken<StudioClock>('studio clock', {
  providedIn: 'root',
  factory: () => ({ zone: signal('UTC'), viewerZone: deviceZone(), now: () => Date.now() }),
});

/** The zone that the device says it is in. */
export function deviceZone(): string {
  return Intl.DateTimeFormat().resolvedOptions().timeZone;
}
