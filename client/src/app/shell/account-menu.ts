import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { MatDivider } from '@angular/material/divider';
import { Router } from '@angular/router';
import { LiveEvents } from '../api';
import { ROLE_WORDS, SessionStore } from '../session';
import { Appearance, type AppearanceChoice } from './appearance';

const CHOICES: readonly { readonly choice: AppearanceChoice; readonly words: string }[] = [
  { choice: 'light', words: 'Light' },
  { choice: 'dark', words: 'Dark' },
  { choice: 'device', words: 'As the device' },
];

/** Who is signed in, light or dark, and the way out. */
@Component({
  selector: 'fettle-account-menu',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDivider, MatMenu, MatMenuItem, MatMenuTrigger],
  template: `
    <button matButton type="button" [matMenuTriggerFor]="menu" class="name">
      <span class="visually-hidden">Signed in as </span>{{ account()?.name }}
    </button>
    <mat-menu #menu="matMenu" xPosition="before">
      <div class="who small">
        {{ roleWords() }}<br /><span class="quiet">{{ account()?.email }}</span>
      </div>
      <mat-divider />
      @for (one of choices; track one.choice) {
        <button
          mat-menu-item
          type="button"
          role="menuitemradio"
          [attr.aria-checked]="appearance.choice() === one.choice"
          (click)="appearance.choose(one.choice)"
        >
          {{ one.words }}{{ appearance.choice() === one.choice ? ' ✓' : '' }}
        </button>
      }
      <mat-divider />
      <button mat-menu-item type="button" (click)="signOut()">Sign out</button>
    </mat-menu>
  `,
  styles: `
    .name {
      max-width: 12rem;
    }
    .who {
      padding: var(--space-2) var(--space-4);
    }
  `,
})
export class AccountMenu {
  private readonly session = inject(SessionStore);
  private readonly live = inject(LiveEvents);
  private readonly router = inject(Router);

  protected readonly appearance = inject(Appearance);
  protected readonly choices = CHOICES;
  protected readonly account = this.session.account;
  protected readonly roleWords = computed(() => {
    const role = this.session.role();
    return role === null ? '' : ROLE_WORDS[role];
  });

  protected async signOut(): Promise<void> {
    await this.session.signOut();
    this.live.disconnect();
    await this.router.navigateByUrl('/sign-in');
  }
}
