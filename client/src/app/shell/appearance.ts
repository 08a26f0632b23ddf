import { DOCUMENT, effect, inject, Injectable, signal } from '@angular/core';

/** Light, dark, or as the device is set. */
export const APPEARANCES = ['device', 'light', 'dark'] as const;
export type AppearanceChoice = (typeof APPEARANCES)[number];

const KEY = 'fettle-appearance';

/** Whether the pages are light or dark; the person's choice is kept on this device. */
@Injectable({ providedIn: 'root' })
export class Appearance {
  private readonly document = inject(DOCUMENT);
  private readonly chosen = signal<AppearanceChoice>(this.kept());

  readonly choice = this.chosen.asReadonly();

  constructor() {
    effect(() => {
      const choice = this.chosen();
      const { dataset } = this.document.documentElement;
      if (choice === 'device') {
        delete dataset['appearance'];
      } else {
        dataset['appearance'] = choice;
      }
    });
  }

  /** Takes a choice and keeps it. */
  choose(choice: AppearanceChoice): void {
    this.chosen.set(choice);
    try {
      this.document.defaultView?.localStorage.setItem(KEY, choice);
    } catch {
      // A browser that keeps nothing still shows the choice until the page is closed.
    }
  }

  private kept(): AppearanceChoice {
    try {
      const kept = this.document.defaultView?.localStorage.getItem(KEY);
      return APPEARANCES.find((one) => one === kept) ?? 'device';
    } catch {
      return 'device';
    }
  }
}
