import { ChangeDetectionStrategy, Component, inject, input, type OnInit, output } from '@angular/core';
import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { endpoints, Name, Note, type RecipeStep, type RecipeView } from '@common/contract';
import { Api } from '../api';
import { VersionedWrites } from '../ui/conflict-dialog';
import { keeps } from '../ui/field-errors';
import { FigureField } from '../ui/figure-field';
import { FormSave } from '../ui/form-save';
import { NoteField } from '../ui/note-field';
import { Notice } from '../ui/notice';
import { DECIMAL, HOURS } from '../ui/reads-text';
import { TextField } from '../ui/text-field';

const LABELS = {
  name: 'Name',
  makes: 'What it makes',
  sizeUnit: 'Unit of size',
  usualSize: 'Usual size',
  usualCasts: 'Usual casts',
  usualMoulds: 'Usual moulds',
  usualCoats: 'Usual coats',
  steps: 'Steps',
};
const figure = (value: number, least: number, most: number): FormControl<number | null> =>
  new FormControl<number | null>(value, [Validators.required, Validators.min(least), Validators.max(most)]);
const hours = (value: number): FormControl<number | null> => new FormControl<number | null>(value, Validators.required);

function stepRow({ stage }: RecipeStep) {
  return new FormGroup({
    name: new FormControl(stage.name, { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    low: hours(stage.handsOn.lowMinutes),
    likely: hours(stage.handsOn.likelyMinutes),
    high: hours(stage.handsOn.highMinutes),
  });
}

/**
 * Changes a recipe: its words, its usual amounts, and each step's name and hours, which is what a finished job teaches. The
 * order of steps, crafts and dwells stay as they are.
 */
@Component({
  selector: 'fettle-recipe-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FigureField, MatButton, NoteField, Notice, TextField],
  template: `
    <form class="stack" novalidate (submit)="submit($event)">
      <section class="board stack" aria-label="What it makes">
        <fettle-text-field label="Name" [control]="form.controls.name" />
        <fettle-note-field label="What it makes" [control]="form.controls.makes" />
        <div class="fields">
          <fettle-text-field label="Unit of size" [longest]="40" [control]="form.controls.sizeUnit" />
          <fettle-figure-field label="Usual size" [reader]="decimal" [control]="form.controls.usualSize" />
          <fettle-figure-field label="Usual casts" [control]="form.controls.usualCasts" />
          <fettle-figure-field label="Usual moulds" [control]="form.controls.usualMoulds" />
          <fettle-figure-field label="Usual coats" [control]="form.controls.usualCoats" />
        </div>
      </section>
      <section class="board stack" aria-labelledby="hours-heading">
        <h2 id="hours-heading">Hands-on hours for one {{ form.controls.sizeUnit.value }}</h2>
        @for (row of form.controls.steps.controls; track row; let index = $index) {
          <fieldset>
            <legend class="visually-hidden">Step {{ index + 1 }}</legend>
            <fettle-text-field [label]="'Step ' + (index + 1)" [control]="row.controls.name" />
            <fettle-figure-field label="Low" unit="h" [reader]="hourReader" [control]="row.controls.low" />
            <fettle-figure-field label="Likely" unit="h" [reader]="hourReader" [control]="row.controls.likely" />
            <fettle-figure-field label="High" unit="h" [reader]="hourReader" [control]="row.controls.high" />
          </fieldset>
        }
      </section>
      @for (sentence of save.messages(); track sentence) {
        <fettle-notice tone="fault" [text]="sentence" />
      }
      <div class="row">
        <button matButton="filled" type="submit" [disabled]="save.busy()">
          {{ save.busy() ? 'Saving…' : 'Save' }}
        </button>
        <button matButton type="button" (click)="done.emit()">Back without saving</button>
      </div>
    </form>
  `,
  styles: `
    fieldset {
      display: grid;
      grid-template-columns: minmax(0, 3fr) repeat(3, minmax(0, 1fr));
      gap: var(--space-2) var(--space-3);
      border: 0;
      margin: 0;
      padding: 0;
      min-width: 0;
    }
    @media (max-width: 48rem) {
      fieldset {
        grid-template-columns: repeat(3, minmax(0, 1fr));
        padding-bottom: var(--space-3);
      }
      fieldset fettle-text-field {
        grid-column: 1 / -1;
      }
    }
  `,
})
export class RecipeForm implements OnInit {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);

  readonly recipe = input.required<RecipeView>();
  /** Saved, or left without saving. */
  readonly done = output();

  protected readonly decimal = DECIMAL;
  protected readonly hourReader = HOURS;
  protected readonly save = new FormSave();
  protected readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    makes: new FormControl('', { nonNullable: true, validators: keeps(Note) }),
    sizeUnit: new FormControl('', { nonNullable: true, validators: Validators.required }),
    usualSize: figure(1, 0.001, 10_000),
    usualCasts: figure(1, 1, 200),
    usualMoulds: figure(0, 0, 20),
    usualCoats: figure(1, 1, 20),
    steps: new FormArray<ReturnType<typeof stepRow>>([]),
  });

  ngOnInit(): void {
    const { steps, ...rest } = this.recipe();
    this.form.patchValue(rest);
    this.form.setControl('steps', new FormArray(steps.map(stepRow)));
  }

  protected async submit(event: Event): Promise<void> {
    event.preventDefault();
    const saved = await this.save.run(
      this.form,
      () => this.send(),
      (path) => (path[0] === 'steps' ? ['steps', path[1], controlOf(path)] : path),
    );
    if (saved !== undefined) {
      this.done.emit();
    }
  }

  private send(): Promise<RecipeView | null> {
    const recipe = this.recipe();
    const { steps, usualSize, usualCasts, usualMoulds, usualCoats, ...words } = this.form.getRawValue();
    const body = {
      ...words,
      usualSize: usualSize ?? recipe.usualSize,
      usualCasts: usualCasts ?? recipe.usualCasts,
      usualMoulds: usualMoulds ?? recipe.usualMoulds,
      usualCoats: usualCoats ?? recipe.usualCoats,
      steps: recipe.steps.map((step, index) => ({ ...step, stage: { ...step.stage, ...stageOf(steps[index]) } })),
    };
    return this.writes.save({
      version: recipe.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeRecipe, { params: { id: recipe.id }, body: { ...body, version } }),
    });
  }
}

function stageOf(row: { name: string; low: number | null; likely: number | null; high: number | null }) {
  return {
    name: row.name.trim(),
    handsOn: { lowMinutes: row.low ?? 0, likelyMinutes: row.likely ?? 0, highMinutes: row.high ?? 0 },
  };
}

/** Where in a step's row a fault of `/steps/3/stage/handsOn/likelyMinutes` belongs. */
function controlOf(path: readonly string[]): string {
  const last = path.at(-1) ?? '';
  return (
    ({ lowMinutes: 'low', likelyMinutes: 'likely', highMinutes: 'high' } as Record<string, string>)[last] ?? 'name'
  );
}
