import { ChangeDetectionStrategy, Component, computed, type ElementRef, inject, viewChild } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { NavigationEnd, Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { filter, map, pairwise } from 'rxjs';
import { LiveEvents } from '../api';
import { SessionStore } from '../session';
import { Wordmark } from '../ui/wordmark';
import { AccountMenu } from './account-menu';
import { LiveBadge } from './live-badge';
import { pagesFor } from './pages';

/** How many pages the foot of a phone shows before the rest stand under "More". */
const FOOT_PAGES = 4;

/** What stands around every page of somebody who is signed in. */
@Component({
  selector: 'fettle-shell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    AccountMenu,
    LiveBadge,
    MatMenu,
    MatMenuItem,
    MatMenuTrigger,
    RouterLink,
    RouterLinkActive,
    RouterOutlet,
    Wordmark,
  ],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
})
export class Shell {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');

  protected readonly studioName = this.session.studioName;
  protected readonly pages = computed(() => pagesFor(this.session.role()));
  protected readonly footPages = computed(() =>
    this.pages().length <= FOOT_PAGES + 1 ? this.pages() : this.pages().slice(0, FOOT_PAGES),
  );
  protected readonly otherPages = computed(() => this.pages().slice(this.footPages().length));

  constructor() {
    inject(LiveEvents).connect();
    // A new page is read from its beginning; moving about inside one (its query) leaves focus alone.
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        map((event) => event.urlAfterRedirects.split(/[?#]/)[0]),
        pairwise(),
        filter(([before, after]) => before !== after),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.toMain());
  }

  /** Puts focus on the page itself, past the navigation. */
  protected toMain(event?: Event): void {
    event?.preventDefault();
    this.main().nativeElement.focus({ preventScroll: event === undefined });
  }
}
