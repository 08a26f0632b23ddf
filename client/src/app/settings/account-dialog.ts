import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatCheckbox } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { type AccountView, endpoints, Name, type Role } from '@common/contract';
import { Api, readEndpoint } from '../api';
import { ROLE_WORDS } from '../session';
import { ChoiceField, choicesOf } from '../ui/choice-field';
import { VersionedWrites } from '../ui/conflict-dialog';
import { keeps, must } from '../ui/field-errors';
import { FormDialog } from '../ui/form-dialog';
import { FormSave } from '../ui/form-save';
import { TextField } from '../ui/text-field';

const LABELS = {
  name: 'Name',
  email: 'E-mail',
  role: 'Role',
  makerId: 'Maker',
  clientId: 'Client',
  active: 'May sign in',
};
const SHORTEST_PASSWORD = 12;

/** Lets a person sign in, or changes how; closes with true where something was saved. */
@Component({
  selector: 'fettle-account-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FormDialog, MatCheckbox, ReactiveFormsModule, TextField],
  template: `
    <fettle-form-dialog
      [title]="account ? 'Change ' + account.name : 'Let somebody in'"
      [save]="save"
      (submitted)="submit()"
    >
      <fettle-text-field label="Name" [control]="form.controls.name" />
      <fettle-text-field label="E-mail" type="email" [control]="form.controls.email" />
      <fettle-choice-field label="As" [control]="form.controls.role" [choices]="roles" />
      @if (written().role === 'maker') {
        <fettle-choice-field
          label="Which maker"
          hint="Whose day sheet it is."
          [control]="form.controls.makerId"
          [choices]="makerChoices()"
        />
      }
      @if (written().role === 'client') {
        <fettle-choice-field
          label="Which client"
          hint="Only this client’s productions are shown."
          [control]="form.controls.clientId"
          [choices]="clientChoices()"
        />
      }
      <fettle-text-field
        [label]="account ? 'New password' : 'Password'"
        type="password"
        autocomplete="new-password"
        [hint]="account ? 'Empty: it stays.' : 'At least 12 characters. Empty: only through Google.'"
        [control]="form.controls.password"
      />
      @if (account) {
        <mat-checkbox [formControl]="form.controls.active">May sign in</mat-checkbox>
      }
    </fettle-form-dialog>
  `,
})
export class AccountDialog {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<AccountDialog, boolean>>(MatDialogRef);
  private readonly makers = readEndpoint(endpoints.listMakers);
  private readonly clients = readEndpoint(endpoints.listClients);

  protected readonly account = inject<AccountView | null>(MAT_DIALOG_DATA);
  protected readonly roles = choicesOf(ROLE_WORDS);
  protected readonly save = new FormSave();
  protected readonly form = new FormGroup({
    name: new FormControl(this.account?.name ?? '', {
      nonNullable: true,
      validators: [Validators.required, keeps(Name)],
    }),
    email: new FormControl(this.account?.email ?? '', {
      nonNullable: true,
      validators: [Validators.required, Validators.email],
    }),
    role: new FormControl<Role>(this.account?.role ?? 'maker', { nonNullable: true }),
    makerId: new FormControl(this.account?.makerId ?? ''),
    clientId: new FormControl(this.account?.clientId ?? ''),
    password: new FormControl('', {
      nonNullable: true,
      validators: must(
        (text: string) => text === '' || text.length >= SHORTEST_PASSWORD,
        `Use at least ${SHORTEST_PASSWORD} characters.`,
      ),
    }),
    active: new FormControl(this.account?.active ?? true, { nonNullable: true }),
  });
  protected readonly written = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  protected readonly makerChoices = computed(() =>
    (this.makers.value() ?? []).map((maker) => ({ value: maker.id, label: maker.name })),
  );
  protected readonly clientChoices = computed(() =>
    (this.clients.value() ?? []).map((client) => ({ value: client.id, label: client.name })),
  );

  protected async submit(): Promise<void> {
    if ((await this.save.run(this.form, () => this.send())) !== undefined) {
      this.ref.close(true);
    }
  }

  private async send(): Promise<AccountView | null> {
    const { password, active, ...raw } = this.form.getRawValue();
    const body = {
      ...raw,
      makerId: raw.role === 'maker' ? raw.makerId || null : null,
      clientId: raw.role === 'client' ? raw.clientId || null : null,
    };
    const { account } = this;
    if (account === null) {
      return this.api.callEndpoint(endpoints.createAccount, { body: { ...body, password: password || null } });
    }
    return this.writes.save({
      version: account.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeAccount, {
          params: { id: account.id },
          body: { ...body, active, ...(password === '' ? {} : { password }), version },
        }),
    });
  }
}
