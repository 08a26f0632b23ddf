import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, NonNullableFormBuilder, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, type KeyDateView } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { Api } from '../../api';
import { ChoiceField, type Choice, choicesOf } from '../../ui/choice-field';
import { ChoicesField } from '../../ui/choices-field';
import { VersionedWrites } from '../../ui/conflict-dialog';
import { FigureField } from '../../ui/figure-field';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { fromDayAndTime, toDayAndTime } from '../../ui/say-time';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { TextField } from '../../ui/text-field';

/** What the dialog is opened with. */
export interface KeyDateDialogData {
  readonly productionId: string;
  /** The key date to change; null to add one. */
  readonly keyDate: KeyDateView | null;
  readonly pieces: readonly Choice<string>[];
}

const STRENGTHS: readonly Choice<KeyDateView['strength']>[] = [
  { value: 'hard', label: 'Hard: it can’t move' },
  { value: 'wished', label: 'Wished: later costs' },
];
const USUAL_WEIGHT = 10;

/** Adds a key date or changes one; closes with true where something was saved. */
@Component({
  selector: 'fettle-key-date-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, ChoicesField, FigureField, FormDialog, TextField],
  template: `
    <fettle-form-dialog
      [title]="data.keyDate ? 'Change the key date' : 'Add a key date'"
      [save]="save"
      (submitted)="submit()"
    >
      <fettle-choice-field label="What it is" [control]="form.controls.kind" [choices]="kinds" />
      <div class="fields">
        <fettle-text-field label="Day" type="date" [control]="form.controls.day" />
        <fettle-text-field label="Time" type="time" [control]="form.controls.time" [hint]="'In ' + zone" />
      </div>
      <div class="fields">
        <fettle-choice-field label="How firm" [control]="form.controls.strength" [choices]="strengths" />
        <fettle-figure-field
          label="Weight"
          [control]="form.controls.weight"
          hint="How much lateness here counts beside other dates; 10 is usual."
        />
      </div>
      @if (data.pieces.length > 1) {
        <fettle-choices-field
          label="Pieces that have to be ready by it"
          hint="None chosen: all of them."
          [control]="form.controls.pieceIds"
          [choices]="data.pieces"
        />
      }
    </fettle-form-dialog>
  `,
})
export class KeyDateDialog {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<KeyDateDialog, boolean>>(MatDialogRef);
  private readonly clock = inject(STUDIO_CLOCK);

  protected readonly data = inject<KeyDateDialogData>(MAT_DIALOG_DATA);
  protected readonly zone = this.clock.zone();
  protected readonly kinds = choicesOf(KEY_DATE_NAMES);
  protected readonly strengths = STRENGTHS;
  protected readonly save = new FormSave();
  private readonly at = this.data.keyDate ? toDayAndTime(this.data.keyDate.at, this.zone) : { day: '', time: '10:00' };

  protected readonly form = inject(NonNullableFormBuilder).group({
    kind: [this.data.keyDate?.kind ?? 'delivery'],
    day: [this.at.day, Validators.required],
    time: [this.at.time, Validators.required],
    strength: [this.data.keyDate?.strength ?? 'hard'],
    pieceIds: new FormControl<string[]>([...(this.data.keyDate?.pieceIds ?? [])], { nonNullable: true }),
    weight: new FormControl<number | null>(this.data.keyDate?.weight ?? USUAL_WEIGHT, [
      Validators.required,
      Validators.min(1),
      Validators.max(1000),
    ]),
  });

  protected async submit(): Promise<void> {
    const saved = await this.save.run(
      this.form,
      () => this.send(),
      (path) => (path[0] === 'at' ? ['day'] : path),
    );
    if (saved !== undefined) {
      this.ref.close(true);
    }
  }

  private async send(): Promise<KeyDateView | null> {
    const { kind, day, time, strength, weight, pieceIds } = this.form.getRawValue();
    const at = fromDayAndTime(day, time, this.zone) ?? '';
    const body = { kind, strength, pieceIds, at, weight: weight ?? USUAL_WEIGHT };
    const { keyDate, productionId } = this.data;
    if (keyDate === null) {
      return this.api.callEndpoint(endpoints.createKeyDate, { params: { id: productionId }, body });
    }
    return this.writes.save({
      version: keyDate.version,
      labels: { kind: 'What it is', at: 'When', strength: 'How firm', weight: 'Weight', pieceIds: 'Pieces' },
      send: (version) =>
        this.api.callEndpoint(endpoints.changeKeyDate, { params: { id: keyDate.id }, body: { ...body, version } }),
    });
  }
}
