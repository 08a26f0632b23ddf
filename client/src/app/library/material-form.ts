import { ChangeDetectionStrategy, Component, inject, input, output, type OnInit } from '@angular/core';
import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { endpoints, type MaterialView, Name, Note } from '@common/contract';
import { cautionsForFamily, MATERIAL_FAMILIES } from '@common/domain/safety';
import { Api } from '../api';
import { ChoiceField, choicesOf } from '../ui/choice-field';
import { VersionedWrites } from '../ui/conflict-dialog';
import { keeps } from '../ui/field-errors';
import { FigureField } from '../ui/figure-field';
import { FormSave } from '../ui/form-save';
import { NoteField } from '../ui/note-field';
import { Notice } from '../ui/notice';
import { CLOCK_TIME, DECIMAL } from '../ui/reads-text';
import { TextField } from '../ui/text-field';
import { type DwellRow, dwellOf, dwellRow, LAW_FIGURES, MILESTONE_CHOICES } from './dwell-row';
import { LAW_WORDS } from './words';

const LABELS = {
  name: 'Name',
  family: 'Family',
  referenceCelsius: 'Temperature of the figures',
  referenceHumidityPercent: 'Humidity of the figures',
  attendedMinutes: 'Somebody stays by it for',
  dwells: 'Dwells',
  cautions: 'Cautions',
  note: 'Note',
};
const needed = (value: number, least: number, most: number): FormControl<number | null> =>
  new FormControl<number | null>(value, [Validators.required, Validators.min(least), Validators.max(most)]);

/** Enters a material or changes one. */
@Component({
  selector: 'fettle-material-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FigureField, MatButton, NoteField, Notice, TextField],
  templateUrl: './material-form.html',
  styles: `
    fieldset {
      display: grid;
      gap: var(--space-3);
      margin: 0;
      padding: var(--space-3);
      border: 1px solid var(--rule);
      border-radius: var(--corner);
      min-width: 0;
    }
    legend {
      font-weight: 600;
    }
    fieldset > button,
    .board > button {
      justify-self: start;
    }
  `,
})
export class MaterialForm implements OnInit {
  private readonly api = inject(Api);
  private readonly router = inject(Router);
  private readonly writes = inject(VersionedWrites);

  /** The material to change; null to enter a new one. */
  readonly material = input<MaterialView | null>(null);
  /** Saved, or left without saving. */
  readonly done = output();

  protected readonly readers = { clock: CLOCK_TIME, decimal: DECIMAL };
  protected readonly laws = choicesOf(LAW_WORDS);
  protected readonly lawFigures = LAW_FIGURES;
  protected readonly milestones = MILESTONE_CHOICES;
  protected readonly save = new FormSave();
  protected readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    family: new FormControl('', { nonNullable: true, validators: Validators.required }),
    referenceCelsius: needed(20, 0, 40),
    referenceHumidityPercent: needed(50, 0, 100),
    attendedMinutes: new FormControl<number | null>(0, Validators.required),
    dwells: new FormArray<DwellRow>([]),
    cautions: new FormControl('', { nonNullable: true }),
    note: new FormControl('', { nonNullable: true, validators: keeps(Note) }),
  });
  protected readonly familyHint = `Such as ${MATERIAL_FAMILIES.slice(0, 5).join(', ')}.`;

  ngOnInit(): void {
    const material = this.material();
    if (material === null) {
      this.addDwell();
      return;
    }
    const { dwells, cautions, ...rest } = material;
    this.form.patchValue({ ...rest, cautions: cautions.join('\n') });
    this.form.setControl('dwells', new FormArray(dwells.map(dwellRow)));
  }

  protected addDwell(): void {
    this.form.controls.dwells.push(
      dwellRow({
        milestone: 'full-cure',
        minutes: { low: 720, likely: 1440, high: 2880 },
        law: { kind: 'none' },
        minimumCelsius: null,
        maximumCelsius: null,
        source: '',
      }),
    );
  }

  /** A known family brings its reminders, where none are written yet. */
  protected takeCautions(): void {
    const { family, cautions } = this.form.controls;
    const known = cautionsForFamily(family.value.trim().toLowerCase());
    cautions.setValue([...new Set([...linesOf(cautions.value), ...known])].join('\n'));
  }

  protected async submit(event: Event): Promise<void> {
    event.preventDefault();
    const saved = await this.save.run(this.form, () => this.send());
    if (saved !== undefined) {
      this.done.emit();
      if (saved !== null && this.material() === null) {
        await this.router.navigate(['/library/materials', saved.id]);
      }
    }
  }

  protected async leave(): Promise<void> {
    this.done.emit();
    if (this.material() === null) {
      await this.router.navigate(['/library']);
    }
  }

  private async send(): Promise<MaterialView | null> {
    const {
      referenceCelsius,
      referenceHumidityPercent,
      attendedMinutes,
      dwells: _rows,
      ...raw
    } = this.form.getRawValue();
    const body = {
      ...raw,
      referenceCelsius: referenceCelsius ?? 20,
      referenceHumidityPercent: referenceHumidityPercent ?? 50,
      attendedMinutes: attendedMinutes ?? 0,
      dwells: this.form.controls.dwells.controls.map(dwellOf),
      cautions: linesOf(raw.cautions),
    };
    const material = this.material();
    if (material === null) {
      return this.api.callEndpoint(endpoints.createMaterial, { body });
    }
    return this.writes.save({
      version: material.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeMaterial, { params: { id: material.id }, body: { ...body, version } }),
    });
  }
}

function linesOf(text: string): string[] {
  return text
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');
}
