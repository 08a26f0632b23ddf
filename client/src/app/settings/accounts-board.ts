import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { type AccountView, endpoints } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { readEndpoint, reloadOnChange } from '../api';
import { ROLE_WORDS, SessionStore } from '../session';
import { Moment } from '../ui/moment';
import { StatePanel } from '../ui/state-panel';
import { AccountDialog } from './account-dialog';

/** Who may sign in, and as what. Only an owner changes it. */
@Component({
  selector: 'fettle-accounts-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Moment, StatePanel],
  template: `
    <section class="board stack" aria-labelledby="accounts-heading">
      <div class="row-ends">
        <h2 id="accounts-heading">People who may sign in</h2>
        @if (isOwner) {
          <button matButton type="button" (click)="edit(null)">Let somebody in</button>
        }
      </div>
      <fettle-state-panel [read]="accounts">
        <ul class="plain-list">
          @for (one of sorted(); track one.id) {
            <li class="row-ends">
              <div>
                <p>
                  <strong>{{ one.name }}</strong> · {{ roles[one.role] }}{{ one.active ? '' : ' · shut out' }}
                </p>
                <p class="small quiet">
                  {{ one.email }} ·
                  @if (one.lastSignInAt; as at) {
                    last here <fettle-moment [at]="at" />
                  } @else {
                    never here yet
                  }
                </p>
              </div>
              @if (isOwner) {
                <button matButton type="button" [attr.aria-label]="'Change ' + one.name" (click)="edit(one)">
                  Change
                </button>
              }
            </li>
          }
        </ul>
      </fettle-state-panel>
    </section>
  `,
  styles: `
    li {
      padding-block: var(--space-1);
      border-top: 1px solid var(--rule);
    }
    li:first-child {
      border-top: 0;
    }
  `,
})
export class AccountsBoard {
  private readonly dialog = inject(MatDialog);

  protected readonly roles = ROLE_WORDS;
  protected readonly isOwner = inject(SessionStore).role() === 'owner';
  protected readonly accounts = readEndpoint(endpoints.listAccounts);
  protected readonly sorted = computed(() =>
    (this.accounts.value() ?? []).toSorted(
      (a, b) => Number(b.active) - Number(a.active) || a.name.localeCompare(b.name),
    ),
  );

  constructor() {
    reloadOnChange(this.accounts, 'account');
  }

  protected async edit(account: AccountView | null): Promise<void> {
    const opened = this.dialog.open<AccountDialog, AccountView | null, boolean>(AccountDialog, {
      data: account,
      width: '32rem',
    });
    if (await firstValueFrom(opened.afterClosed())) {
      this.accounts.reload();
    }
  }
}
