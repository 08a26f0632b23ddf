import { ChangeDetectionStrategy, Component, DOCUMENT, inject } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { Appearance } from './shell/appearance';
import { writeHues } from './ui/production-hues';

/** The root: what is shown is the router's to say. */
@Component({
  selector: 'fettle-root',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterOutlet],
  template: '<router-outlet />',
})
export class App {
  constructor() {
    // Made here so that a kept choice of light or dark holds before any page is shown.
    inject(Appearance);
    writeHues(inject(DOCUMENT).documentElement);
  }
}
