import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, NonNullableFormBuilder, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, Name, Note, type ProductionSummary, type ProductionView } from '@common/contract';
import { isMark, PRODUCTION_HUES, suggestMark } from '@common/domain/production-hue';
import { Api, readEndpoint } from '../../api';
import { ChoiceField, choicesOf } from '../../ui/choice-field';
import { VersionedWrites } from '../../ui/conflict-dialog';
import { keeps, must } from '../../ui/field-errors';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { HueField } from '../../ui/hue-field';
import { NoteField } from '../../ui/note-field';
import { TextField } from '../../ui/text-field';
import { PRODUCTION_STATE_HINTS, PRODUCTION_STATE_WORDS } from '../words';

/** What the dialog is opened with. */
export interface ProductionDialogData {
  /** The production to change; null to enter a new one. */
  readonly production: ProductionView | null;
  /** The other productions, whose marks and hues are taken. */
  readonly others: readonly Pick<ProductionSummary, 'id' | 'mark' | 'hue' | 'state'>[];
}

const LABELS = { name: 'Name', clientId: 'Client', mark: 'Mark', hue: 'Hue', state: 'State', note: 'Note' };

/** Enters a production or changes one; closes with it as the server stored it. */
@Component({
  selector: 'fettle-production-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FormDialog, HueField, MatButton, NoteField, TextField],
  template: `
    <fettle-form-dialog
      [title]="data.production ? 'Change the production' : 'Enter a production'"
      [action]="data.production ? 'Save' : 'Enter it'"
      [save]="save"
      (submitted)="submit()"
    >
      <fettle-text-field label="Name" [control]="form.controls.name" />
      @if (isNewClient()) {
        <fettle-text-field label="New client’s name" [control]="newClient" />
        @if (clientChoices().length > 0) {
          <button matButton type="button" (click)="isNewClient.set(false)">Choose a known client</button>
        }
      } @else {
        <fettle-choice-field label="Client" [control]="form.controls.clientId" [choices]="clientChoices()" />
        <button matButton type="button" (click)="isNewClient.set(true)">The client is new</button>
      }
      <div class="fields">
        <fettle-text-field
          label="Mark"
          [control]="form.controls.mark"
          [longest]="2"
          hint="Two letters, printed wherever its hue is."
        />
        <fettle-choice-field
          label="State"
          [control]="form.controls.state"
          [choices]="states"
          [hint]="stateHint()"
          (chosen)="state.set(form.controls.state.value)"
        />
      </div>
      <fettle-hue-field [control]="form.controls.hue" [taken]="takenHues" />
      <fettle-note-field label="Note" [control]="form.controls.note" />
    </fettle-form-dialog>
  `,
  styles: `
    button {
      justify-self: start;
    }
  `,
})
export class ProductionDialog {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<ProductionDialog, ProductionView | 'read-again'>>(MatDialogRef);

  protected readonly data = inject<ProductionDialogData>(MAT_DIALOG_DATA);
  private readonly others = this.data.others.filter((one) => one.id !== this.data.production?.id);
  private readonly inPlan = this.others.filter((one) => one.state === 'committed' || one.state === 'tentative');
  protected readonly takenHues = this.inPlan.map((one) => one.hue);

  private readonly clients = readEndpoint(endpoints.listClients);
  protected readonly clientChoices = computed(() =>
    (this.clients.value() ?? []).map((client) => ({ value: client.id, label: client.name })),
  );
  protected readonly states = choicesOf(PRODUCTION_STATE_WORDS);
  protected readonly save = new FormSave();
  protected readonly isNewClient = signal(false);
  protected readonly newClient = new FormControl('', { nonNullable: true, validators: keeps(Name) });

  protected readonly form = inject(NonNullableFormBuilder).group({
    name: [this.data.production?.name ?? '', [Validators.required, keeps(Name)]],
    clientId: [this.data.production?.clientId ?? ''],
    mark: [
      this.data.production?.mark ?? '',
      must((mark: string) => mark === '' || isMark(mark), 'A mark is two letters.'),
    ],
    hue: [this.data.production?.hue ?? this.freeHue()],
    state: [this.data.production?.state ?? 'committed'],
    note: [this.data.production?.note ?? '', keeps(Note)],
  });
  protected readonly state = signal(this.form.controls.state.value);
  protected readonly stateHint = computed(() => PRODUCTION_STATE_HINTS[this.state()]);

  protected async submit(): Promise<void> {
    if (!this.isNewClient() && this.form.controls.clientId.value === '') {
      this.save.say('Say for which client it is.');
      return;
    }
    if (this.isNewClient() && this.newClient.invalid) {
      this.newClient.markAsTouched();
      return;
    }
    const saved = await this.save.run(this.form, () => this.send());
    if (saved !== undefined) {
      this.ref.close(saved ?? 'read-again');
    }
  }

  private async send(): Promise<ProductionView | null> {
    const { mark, ...rest } = this.form.getRawValue();
    const marks = this.others.map((one) => one.mark);
    const body = { ...rest, mark: mark || suggestMark(rest.name, marks), clientId: await this.clientId() };
    const { production } = this.data;
    if (production === null) {
      return this.api.callEndpoint(endpoints.createProduction, { body });
    }
    return this.writes.save({
      version: production.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeProduction, {
          params: { id: production.id },
          body: { ...body, version },
        }),
    });
  }

  /** Enters the client first where it is new; a second try after a fault elsewhere finds it known. */
  private async clientId(): Promise<string> {
    if (this.isNewClient()) {
      const client = await this.api.callEndpoint(endpoints.createClient, { body: { name: this.newClient.value } });
      this.clients.set([...(this.clients.value() ?? []), client]);
      this.form.controls.clientId.setValue(client.id);
      this.isNewClient.set(false);
    }
    return this.form.controls.clientId.value;
  }

  private freeHue(): number {
    const free = PRODUCTION_HUES.findIndex((_hue, index) => !this.takenHues.includes(index));
    return free === -1 ? 0 : free;
  }
}
