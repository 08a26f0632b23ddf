import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { PageHeading } from '../ui/page-heading';

/** For addresses that lead nowhere. */
@Component({
  selector: 'fettle-not-found-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, PageHeading, RouterLink],
  template: `
    <div class="page">
      <fettle-page-heading title="There is nothing here" lead="The address is old, or a letter is missing." />
      <p><a matButton="filled" routerLink="/">To your first page</a></p>
    </div>
  `,
})
export class NotFoundPage {}
