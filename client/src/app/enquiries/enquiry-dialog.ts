import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, NonNullableFormBuilder, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, Name, Note, type ProductionSummary, type ProductionView } from '@common/contract';
import { PRODUCTION_HUES, suggestMark } from '@common/domain/production-hue';
import { Api, readEndpoint } from '../api';
import { ChoiceField } from '../ui/choice-field';
import { keeps } from '../ui/field-errors';
import { FormDialog } from '../ui/form-dialog';
import { FormSave } from '../ui/form-save';
import { NoteField } from '../ui/note-field';
import { fromDayAndTime } from '../ui/say-time';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { TextField } from '../ui/text-field';

/** What the dialog is opened with. */
export interface EnquiryDialogData {
  /** The other productions, whose marks and hues are taken. */
  readonly others: readonly Pick<ProductionSummary, 'mark' | 'hue'>[];
}

const USUAL_WEIGHT = 10;

/** Enters an enquiry: who asks, for what, and by when they wish it delivered; closes with it as the server stored it. */
@Component({
  selector: 'fettle-enquiry-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FormDialog, MatButton, NoteField, TextField],
  template: `
    <fettle-form-dialog title="Enter an enquiry" action="Enter it" [save]="save" (submitted)="submit()">
      <fettle-text-field label="Name" [control]="form.controls.name" />
      @if (isNewClient()) {
        <fettle-text-field label="New client’s name" [control]="newClient" />
        <button matButton type="button" (click)="isNewClient.set(false)">Choose a known client</button>
      } @else {
        <fettle-choice-field label="Client" [control]="form.controls.clientId" [choices]="clientChoices()" />
        <button matButton type="button" (click)="isNewClient.set(true)">The client is new</button>
      }
      <div class="fields">
        <fettle-text-field label="Wished delivery, day" type="date" [control]="form.controls.day" />
        <fettle-text-field label="Time" type="time" [control]="form.controls.time" [hint]="'In ' + clock.zone()" />
      </div>
      <fettle-note-field label="Brief" [control]="form.controls.note" />
    </fettle-form-dialog>
  `,
  styles: `
    button {
      justify-self: start;
    }
  `,
})
export class EnquiryDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<EnquiryDialog, ProductionView>>(MatDialogRef);
  private readonly data = inject<EnquiryDialogData>(MAT_DIALOG_DATA);
  protected readonly clock = inject(STUDIO_CLOCK);

  private readonly clients = readEndpoint(endpoints.listClients);
  protected readonly clientChoices = computed(() =>
    (this.clients.value() ?? []).map((client) => ({ value: client.id, label: client.name })),
  );
  protected readonly save = new FormSave();
  protected readonly isNewClient = signal(false);
  protected readonly newClient = new FormControl('', { nonNullable: true, validators: keeps(Name) });
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, keeps(Name)]],
    clientId: [''],
    day: [''],
    time: ['17:00'],
    note: ['', keeps(Note)],
  });

  protected async submit(): Promise<void> {
    if (!this.isNewClient() && this.form.controls.clientId.value === '') {
      this.save.say('Say who asks for it.');
      return;
    }
    if (this.isNewClient() && this.newClient.invalid) {
      this.newClient.markAsTouched();
      return;
    }
    const saved = await this.save.run(this.form, () => this.send());
    if (saved !== undefined) this.ref.close(saved);
  }

  private async send(): Promise<ProductionView> {
    const { name, note, day, time } = this.form.getRawValue();
    const { others } = this.data;
    const taken = others.map(({ hue }) => hue);
    const hue = Math.max(
      0,
      PRODUCTION_HUES.findIndex((_hue, index) => !taken.includes(index)),
    );
    const mark = suggestMark(
      name,
      others.map((one) => one.mark),
    );
    const at = fromDayAndTime(day, time, this.clock.zone());
    const wished = { kind: 'delivery' as const, strength: 'wished' as const, weight: USUAL_WEIGHT, pieceIds: [] };
    const keyDates = at === null ? [] : [{ ...wished, at }];
    const clientId = await this.clientId();
    const body = { name, note, mark, hue, clientId, keyDates, state: 'tentative' as const };
    return this.api.callEndpoint(endpoints.createProduction, { body });
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
}
