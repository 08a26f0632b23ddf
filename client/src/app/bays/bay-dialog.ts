import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormArray, FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatCheckbox } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { type BayView, endpoints, Name, Note } from '@common/contract';
import { Api } from '../api';
import { ChoiceField, choicesOf } from '../ui/choice-field';
import { VersionedWrites } from '../ui/conflict-dialog';
import { keeps } from '../ui/field-errors';
import { FigureField } from '../ui/figure-field';
import { FormDialog } from '../ui/form-dialog';
import { FormSave } from '../ui/form-save';
import { NoteField } from '../ui/note-field';
import { patternOf, patternRow, PatternsField } from '../ui/patterns';
import { DECIMAL } from '../ui/reads-text';
import { TextField } from '../ui/text-field';
import { BAY_KIND_WORDS } from './words';

const LABELS = {
  name: 'Name',
  kind: 'Kind',
  capacity: 'Holds',
  temperatureCelsius: 'Temperature',
  humidityPercent: 'Humidity',
  size: 'Size',
  openings: 'Open',
  note: 'Note',
  active: 'In use',
};
const WHOLE_MM = { min: 1, max: 100_000 };

const figure = (value: number | null, least: number, most: number): FormControl<number | null> =>
  new FormControl(value, [Validators.min(least), Validators.max(most)]);

/** Adds a bay or changes one; closes with true where something was saved. */
@Component({
  selector: 'fettle-bay-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    ChoiceField,
    FigureField,
    FormDialog,
    MatCheckbox,
    NoteField,
    PatternsField,
    ReactiveFormsModule,
    TextField,
  ],
  template: `
    <fettle-form-dialog [title]="bay ? 'Change ' + bay.name : 'Add a bay'" [save]="save" (submitted)="submit()">
      <div class="fields">
        <fettle-text-field label="Name" [control]="form.controls.name" />
        <fettle-choice-field label="Kind" [control]="form.controls.kind" [choices]="kinds" />
        <fettle-figure-field label="Holds at once" unit="pieces" [control]="form.controls.capacity" />
      </div>
      <div class="fields">
        <fettle-figure-field label="Length" unit="mm" [control]="form.controls.lengthMm" />
        <fettle-figure-field label="Width" unit="mm" [control]="form.controls.widthMm" />
        <fettle-figure-field label="Height" unit="mm" [control]="form.controls.heightMm" />
      </div>
      <div class="fields">
        <fettle-figure-field
          label="Temperature"
          unit="°C"
          hint="Empty: the studio’s room."
          [reader]="decimal"
          [control]="form.controls.temperatureCelsius"
        />
        <fettle-figure-field
          label="Humidity"
          unit="%"
          hint="Empty: the studio’s room."
          [reader]="decimal"
          [control]="form.controls.humidityPercent"
        />
      </div>
      <h3>When work may be done in it</h3>
      <fettle-patterns-field
        [rows]="form.controls.openings"
        emptyHint="Always, whenever makers are in."
        addWords="Add opening hours"
      />
      <fettle-note-field label="Note" [control]="form.controls.note" />
      @if (bay) {
        <mat-checkbox [formControl]="form.controls.active">In use</mat-checkbox>
      }
    </fettle-form-dialog>
  `,
})
export class BayDialog {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<BayDialog, boolean>>(MatDialogRef);

  protected readonly bay = inject<BayView | null>(MAT_DIALOG_DATA);
  protected readonly decimal = DECIMAL;
  protected readonly kinds = choicesOf(BAY_KIND_WORDS);
  protected readonly save = new FormSave();
  protected readonly form = new FormGroup({
    name: new FormControl(this.bay?.name ?? '', { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    kind: new FormControl(this.bay?.kind ?? 'table', { nonNullable: true }),
    capacity: new FormControl<number | null>(this.bay?.capacity ?? 1, [
      Validators.required,
      Validators.min(1),
      Validators.max(50),
    ]),
    lengthMm: figure(this.bay?.size?.lengthMm ?? null, WHOLE_MM.min, WHOLE_MM.max),
    widthMm: figure(this.bay?.size?.widthMm ?? null, WHOLE_MM.min, WHOLE_MM.max),
    heightMm: figure(this.bay?.size?.heightMm ?? null, WHOLE_MM.min, WHOLE_MM.max),
    temperatureCelsius: figure(this.bay?.temperatureCelsius ?? null, -20, 300),
    humidityPercent: figure(this.bay?.humidityPercent ?? null, 0, 100),
    openings: new FormArray((this.bay?.openings ?? []).map(patternRow)),
    note: new FormControl(this.bay?.note ?? '', { nonNullable: true, validators: keeps(Note) }),
    active: new FormControl(this.bay?.active ?? true, { nonNullable: true }),
  });

  protected async submit(): Promise<void> {
    const { lengthMm, widthMm, heightMm } = this.form.getRawValue();
    if ((lengthMm === null) !== (widthMm === null) || (heightMm !== null && lengthMm === null)) {
      this.save.say('Give the length and the width together, or neither.');
      return;
    }
    const saved = await this.save.run(
      this.form,
      () => this.send(),
      (path) => (path[0] === 'size' ? path.slice(1) : path),
    );
    if (saved !== undefined) {
      this.ref.close(true);
    }
  }

  private async send(): Promise<BayView | null> {
    const { lengthMm, widthMm, heightMm, active, capacity, openings: _rows, ...rest } = this.form.getRawValue();
    const body = {
      ...rest,
      capacity: capacity ?? 1,
      size: lengthMm === null || widthMm === null ? null : { lengthMm, widthMm, heightMm },
      openings: this.form.controls.openings.controls.map(patternOf),
    };
    const { bay } = this;
    if (bay === null) {
      return this.api.callEndpoint(endpoints.createBay, { body });
    }
    return this.writes.save({
      version: bay.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeBay, { params: { id: bay.id }, body: { ...body, active, version } }),
    });
  }
}
