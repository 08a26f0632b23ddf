import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterOutlet } from '@angular/router';

/** The shell around every page. */
@Component({
  selector: 'fettle-root',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterOutlet],
  template: `
    <header><h1>Fettle</h1></header>
    <main><router-outlet /></main>
  `,
})
export class App {}
