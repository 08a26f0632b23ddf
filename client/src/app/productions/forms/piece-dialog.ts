import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, NonNullableFormBuilder, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, Name, Note, type ProductionView, type RecipeView } from '@common/contract';
import { recipeAmountsFault } from '@common/domain/recipe';
import { Api, readEndpoint } from '../../api';
import { ChoiceField } from '../../ui/choice-field';
import { keeps } from '../../ui/field-errors';
import { FigureField } from '../../ui/figure-field';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { NoteField } from '../../ui/note-field';
import { Notice } from '../../ui/notice';
import { DECIMAL } from '../../ui/reads-text';
import { TextField } from '../../ui/text-field';
import type { StageNames } from '../parts/say-stage';
import { RecipePreview } from './recipe-preview';

/** What the dialog is opened with. */
export interface PieceDialogData {
  readonly productionId: string;
  readonly names: StageNames;
}

/** Adds a piece, empty or from a recipe in chosen amounts, with a look at the stages first; closes with the production. */
@Component({
  selector: 'fettle-piece-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FigureField, FormDialog, NoteField, Notice, RecipePreview, TextField],
  template: `
    <fettle-form-dialog title="Add a piece" action="Add it" [save]="save" (submitted)="submit()">
      <fettle-text-field label="Name" [control]="form.controls.name" />
      <fettle-choice-field
        label="How it is made"
        [control]="form.controls.recipeId"
        [choices]="choices()"
        (chosen)="takeUsual()"
      />
      @if (recipe(); as known) {
        @if (known.makes) {
          <p class="quiet small">{{ known.makes }}</p>
        }
        <div class="fields">
          <fettle-figure-field [label]="'Size, ' + known.sizeUnit" [reader]="decimal" [control]="form.controls.size" />
          <fettle-figure-field label="Casts" [control]="form.controls.casts" />
          <fettle-figure-field label="Moulds" [control]="form.controls.moulds" />
          <fettle-figure-field label="Coats" [control]="form.controls.coats" />
        </div>
        @if (amountsFault(); as fault) {
          <fettle-notice tone="fault" [text]="fault" />
        } @else if (amounts(); as chosen) {
          <fettle-recipe-preview [recipe]="known" [amounts]="chosen" [names]="data.names" />
        }
      }
      <fettle-note-field label="Note" [control]="form.controls.note" />
    </fettle-form-dialog>
  `,
})
export class PieceDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<PieceDialog, ProductionView>>(MatDialogRef);
  private readonly recipes = readEndpoint(endpoints.listRecipes);

  protected readonly data = inject<PieceDialogData>(MAT_DIALOG_DATA);
  protected readonly decimal = DECIMAL;
  protected readonly save = new FormSave();
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, keeps(Name)]],
    note: ['', keeps(Note)],
    recipeId: [''],
    size: new FormControl<number | null>(1),
    casts: new FormControl<number | null>(1),
    moulds: new FormControl<number | null>(0),
    coats: new FormControl<number | null>(1),
  });
  private readonly written = toSignal(this.form.valueChanges, { initialValue: this.form.value });

  protected readonly choices = computed(() => [
    { value: '', label: 'From nothing: I’ll add its stages myself' },
    ...(this.recipes.value() ?? []).map((recipe) => ({ value: recipe.id, label: recipe.name })),
  ]);
  protected readonly recipe = computed<RecipeView | null>(
    () => this.recipes.value()?.find((one) => one.id === this.written().recipeId) ?? null,
  );
  protected readonly amounts = computed(() => {
    const { size, casts, moulds, coats } = this.written();
    return { size: size ?? 0, casts: casts ?? 0, moulds: moulds ?? 0, coats: coats ?? 0 };
  });
  protected readonly amountsFault = computed(() => {
    const recipe = this.recipe();
    return recipe === null ? null : recipeAmountsFault(recipe, this.amounts());
  });

  /** A recipe brings the amounts in which it is usually made. */
  protected takeUsual(): void {
    const recipe = this.recipe();
    if (recipe) {
      this.form.patchValue({
        size: recipe.usualSize,
        casts: recipe.usualCasts,
        moulds: recipe.usualMoulds,
        coats: recipe.usualCoats,
        name: this.form.controls.name.value || recipe.name,
      });
    }
  }

  protected async submit(): Promise<void> {
    if (this.amountsFault() !== null) {
      return;
    }
    const { name, note } = this.form.getRawValue();
    const recipe = this.recipe();
    const body = { name, note, recipe: recipe === null ? null : { recipeId: recipe.id, ...this.amounts() } };
    const saved = await this.save.run(
      this.form,
      () => this.api.callEndpoint(endpoints.createPiece, { params: { id: this.data.productionId }, body }),
      (path) => (path[0] === 'recipe' ? path.slice(1) : path),
    );
    if (saved) {
      this.ref.close(saved);
    }
  }
}
