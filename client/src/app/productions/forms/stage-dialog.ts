import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, type PieceView, type ProductionView, type StageView } from '@common/contract';
import { MILESTONE_NAMES, type MaterialMilestone } from '@common/domain/material';
import { stageFaults } from '@common/domain/stage-rules';
import { Api, readEndpoint } from '../../api';
import { ChoiceField, choicesOf } from '../../ui/choice-field';
import { ChoicesField } from '../../ui/choices-field';
import { Confirm } from '../../ui/confirm';
import { VersionedWrites } from '../../ui/conflict-dialog';
import { showFaults } from '../../ui/field-errors';
import { FigureField } from '../../ui/figure-field';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { STUDIO_CURRENCY } from '../../ui/money';
import { NoteField } from '../../ui/note-field';
import { CLOCK_TIME, HOURS, moneyIn, PER_CENT } from '../../ui/reads-text';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { TextField } from '../../ui/text-field';
import type { StageNames } from '../parts/say-stage';
import { CONTINUITY_WORDS, HOLD_WORDS, STAGE_KIND_WORDS } from '../words';
import { LinksEditor } from './links-editor';
import { BLANK_STAGE, crewRow, isUntouched, placeRow, stageControlPath, stageDraftOf, stageForm } from './stage-form';

/** What the dialog is opened with. */
export interface StageDialogData {
  readonly production: ProductionView;
  readonly piece: PieceView;
  /** The stage to change; null to add one. */
  readonly stage: StageView | null;
  /** The stage that a new one follows unless something else is said; null for none. */
  readonly lastStageId: string | null;
  readonly names: StageNames;
}

const LABELS = {
  name: 'Name',
  kind: 'Kind',
  handsOn: 'Hands-on hours',
  crew: 'Crew',
  crewLossPermille: 'Loss by more hands',
  continuity: 'Interruption',
  places: 'Where',
  dwell: 'Dwell',
  cautions: 'Cautions',
  note: 'Note',
  visitAt: 'Visit',
  replyMinutes: 'Usual time to an answer',
};

const DWELL_SOURCES = { none: 'No dwell', material: 'A material’s', minutes: 'A time of its own' };
const WINDOW_WORDS = {
  none: 'No: the next stage may come at any time after',
  soft: 'Yes: later costs extra work',
  hard: 'Yes: never later',
};

/** Adds a stage or changes one: what it takes, where, its dwell, and what it waits for. */
@Component({
  selector: 'fettle-stage-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, ChoicesField, FigureField, FormDialog, LinksEditor, MatButton, NoteField, TextField],
  templateUrl: './stage-dialog.html',
  styleUrl: './stage-dialog.scss',
})
export class StageDialog {
  private readonly api = inject(Api);
  private readonly confirm = inject(Confirm);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<StageDialog, boolean>>(MatDialogRef);
  private readonly crafts = readEndpoint(endpoints.listCrafts);
  private readonly bays = readEndpoint(endpoints.listBays);
  private readonly materials = readEndpoint(endpoints.listMaterials);

  protected readonly data = inject<StageDialogData>(MAT_DIALOG_DATA);
  protected readonly zone = inject(STUDIO_CLOCK).zone();
  protected readonly currency = inject(STUDIO_CURRENCY)();
  protected readonly readers = { hours: HOURS, clock: CLOCK_TIME, perCent: PER_CENT, money: moneyIn(this.currency) };
  protected readonly kinds = choicesOf(STAGE_KIND_WORDS);
  protected readonly continuities = choicesOf(CONTINUITY_WORDS);
  protected readonly holds = choicesOf(HOLD_WORDS);
  protected readonly dwellSources = choicesOf(DWELL_SOURCES);
  protected readonly windows = choicesOf(WINDOW_WORDS);
  protected readonly save = new FormSave();
  protected readonly form = stageForm(this.data.stage ?? BLANK_STAGE, this.zone);
  protected readonly written = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  protected readonly canRemove = this.data.stage !== null && isUntouched(this.data.stage);
  /** For a new stage: what it waits for. */
  protected readonly after = new FormControl(this.data.lastStageId === null ? [] : [this.data.lastStageId], {
    nonNullable: true,
  });

  protected readonly craftChoices = computed(() => named(this.crafts.value()));
  protected readonly bayChoices = computed(() => named(this.bays.value()?.filter((bay) => bay.active)));
  protected readonly materialChoices = computed(() => named(this.materials.value()));
  protected readonly milestoneChoices = computed(() =>
    this.dwellsOfMaterial().map((dwell) => ({
      value: dwell.milestone,
      label: MILESTONE_NAMES[dwell.milestone],
    })),
  );
  protected readonly otherStages = this.data.production.stagesInOrder
    .filter((stage) => stage.id !== this.data.stage?.id)
    .map((stage) => ({ value: stage.id, label: this.data.names.stageName(stage.id, this.data.piece.id) }));
  protected readonly untilChoices: readonly { value: string | null; label: string }[] = this.otherStages;
  private readonly dwellsOfMaterial = computed(
    () => this.materials.value()?.find((one) => one.id === this.written().materialId)?.dwells ?? [],
  );

  /** A sign-off has no hands, a make has some: the usual of each kind is filled in where nothing else was said. */
  protected takeKind(): void {
    const { kind, likely, continuity, crew, replyMinutes } = this.form.controls;
    if (kind.value === 'sign-off' && crew.length === 0) {
      this.form.patchValue({ low: 0, likely: 0, high: 0, continuity: 'clock' });
      if (replyMinutes.value === 0) {
        replyMinutes.setValue(2 * 1440);
      }
    } else if (kind.value !== 'sign-off' && continuity.value === 'clock' && likely.value === 0) {
      continuity.setValue('shifts');
    }
  }

  /** The material says how long; a person may know better. */
  protected takeDwell(): void {
    const { milestone, dwellMinutes, attendedMinutes, materialId } = this.form.controls;
    const known = this.dwellsOfMaterial().find((dwell) => dwell.milestone === (milestone.value as MaterialMilestone));
    if (known) {
      dwellMinutes.setValue(known.minutes.likely);
      attendedMinutes.setValue(
        this.materials.value()?.find((one) => one.id === materialId.value)?.attendedMinutes ?? 0,
      );
    }
  }

  protected addCrew(): void {
    this.form.controls.crew.push(crewRow({ craftId: '', least: 1, most: 1 }));
  }

  protected addPlace(): void {
    this.form.controls.places.push(placeRow({ bayIds: [], units: 1, hold: 'work', untilStageId: null }));
  }

  protected async submit(): Promise<void> {
    const draft = stageDraftOf(this.form, this.zone);
    const faults = stageFaults(draft).map(({ pointer, sentence }) => ({ pointer, detail: sentence }));
    if (this.form.valid && faults.length > 0) {
      const placeless = showFaults(this.form, faults, stageControlPath);
      this.save.say([...new Set(placeless.map((fault) => fault.detail))].join(' ') || 'Some fields need another look.');
      return;
    }
    const saved = await this.save.run(this.form, () => this.send(draft), stageControlPath);
    if (saved !== undefined) {
      this.ref.close(true);
    }
  }

  protected async remove(stage: StageView): Promise<void> {
    const sure = await this.confirm.ask({
      title: `Remove ${stage.name}?`,
      text: 'Its links and the purchases it needs go with it. This can’t be taken back.',
      action: 'Remove the stage',
    });
    if (!sure) {
      return;
    }
    const params = { id: stage.id };
    const gone = await this.save.run(this.form, async () => {
      await this.api.callEndpoint(endpoints.removeStage, { params, query: { version: stage.version } });
      return true;
    });
    if (gone) {
      this.ref.close(true);
    }
  }

  private async send(draft: ReturnType<typeof stageDraftOf>): Promise<StageView | null> {
    const { stage, piece } = this.data;
    if (stage === null) {
      const body = { ...draft, afterStageIds: this.after.value };
      return this.api.callEndpoint(endpoints.createStage, { params: { id: piece.id }, body });
    }
    return this.writes.save({
      version: stage.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeStage, { params: { id: stage.id }, body: { ...draft, version } }),
    });
  }
}

function named(
  records: readonly { readonly id: string; readonly name: string }[] | undefined,
): readonly { readonly value: string; readonly label: string }[] {
  return (records ?? []).map(({ id, name }) => ({ value: id, label: name }));
}
