import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { sayUnmet } from '@common/planning';
import { formatDayAndTime } from '@common/time/format-instant';
import { debounceTime } from 'rxjs';
import { ChoiceField } from '../../ui/choice-field';
import { FieldErrorPipe, must } from '../../ui/field-errors';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { fromDayAndTime, instantOf, minuteOf, toDayAndTime } from '../../ui/say-time';
import { dateChanges, dateMargins } from '../date-margins';
import { LatestOnly } from '../planning-worker/latest-only';
import { PlanningLine } from '../planning-worker/planning-line';
import type { AnswerBody, Trial } from '../planning-worker/protocol';
import { PlanStore } from '../plan-store';
import type { Place } from '../timeline/engine/hold-machine';
import { workStart } from '../timeline/engine/tape';
import { unmetAdded } from '../timeline/unmet-added';
import { sayLoss, sayMarginChange } from '../wording/say-margin';

/** What the form moves. */
export interface MoveDialogData {
  readonly stageId: string;
}

/** How long the fields rest before the move is tried out. */
const REST_MS = 250;

/** Moves a stage by words and figures: all that a hand can do on the wall, and the same consequences before it is done. */
@Component({
  selector: 'fettle-move-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FieldErrorPipe, FormDialog, MatError, MatFormField, MatInput, MatLabel, ReactiveFormsModule],
  templateUrl: './move-dialog.html',
  styleUrl: './move-dialog.scss',
})
export class MoveDialog {
  private readonly plan = inject(PlanStore);
  private readonly line = inject(PlanningLine);
  private readonly dialog = inject<MatDialogRef<MoveDialog, boolean>>(MatDialogRef);
  private readonly stageId = inject<MoveDialogData>(MAT_DIALOG_DATA).stageId;
  private readonly view = this.plan.view()!;
  private readonly stage = this.view.problem.stages.find((one) => one.id === this.stageId)!;
  private readonly placement = this.view.plan.placements.find((one) => one.stageId === this.stageId)!;
  private readonly names = this.plan.names()!;
  private readonly trialNow = signal<Trial | null>(null);
  private readonly trials = new LatestOnly<Place, AnswerBody>(
    (place) => this.line.ask({ kind: 'try-move', move: { stageId: this.stageId, ...place } }),
    (answer) => this.trialNow.set(answer.kind === 'moved' ? answer.trial : null),
  );

  protected readonly save = new FormSave();
  protected readonly title = `Move ${this.names.stage(this.stageId)}`;
  protected readonly crews = this.crewChoices();
  protected readonly bays = this.bayChoices();
  private readonly from = toDayAndTime(instantOf(workStart(this.placement)), this.view.zone);
  protected readonly form = new FormGroup({
    day: new FormControl(this.from.day, { nonNullable: true, validators: [Validators.required] }),
    time: new FormControl(this.from.time, {
      nonNullable: true,
      validators: [
        Validators.required,
        must((time: string) => /^\d{2}:\d{2}$/.test(time), 'Write a time such as 08:30.'),
      ],
    }),
    crew: new FormControl<string>(ENGINE, { nonNullable: true }),
    bay: new FormControl<string>(ENGINE, { nonNullable: true }),
  });
  protected readonly outcome = computed(() => {
    const trial = this.trialNow();
    if (!trial) return null;
    const moved = new Set(trial.moved);
    const after = {
      placements: [...this.view.plan.placements.filter((one) => !moved.has(one.stageId)), ...trial.placements],
    };
    const changes = dateChanges(this.plan.margins(), dateMargins(this.view.problem, after));
    const broken = unmetAdded(this.view.unmet, trial.unmet).filter((one) => one.rule !== 'key-date');
    return {
      follow: trial.moved.filter((id) => id !== this.stageId).length,
      dates: changes.map((change) => ({
        id: change.keyDate.id,
        words: `${this.names.keyDateInFull(change.keyDate.id)}: ${sayMarginChange(change)} (${sayLoss(change)})`,
      })),
      broken: broken.map((one) => sayUnmet(one, this.names, (at) => formatDayAndTime(at, this.view.zone))),
    };
  });

  constructor() {
    this.form.valueChanges.pipe(debounceTime(REST_MS), takeUntilDestroyed()).subscribe(() => {
      const place = this.place();
      if (place) this.trials.put(place);
    });
  }

  protected async submit(): Promise<void> {
    const done = await this.save.run(this.form, async () => {
      const place = this.place();
      return place !== null && (await this.plan.moveStage(this.stageId, place));
    });
    if (done === true) this.dialog.close(true);
    else if (done === false) this.save.say(this.plan.trouble()?.detail ?? 'Write a day and a time such as 08:30.');
  }

  private place(): Place | null {
    const { day, time, crew, bay } = this.form.getRawValue();
    const start = fromDayAndTime(day, time, this.view.zone);
    if (start === null) return null;
    return { start: minuteOf(start), makerIds: readIds(crew), bayIds: readIds(bay) };
  }

  private crewChoices(): readonly { readonly value: string; readonly label: string }[] {
    const own = [...new Set(this.placement.crew.map((member) => member.makerId))];
    if (own.length === 0) return [];
    const craftId = this.placement.crew[0].craftId;
    const others = this.view.problem.makers
      .filter((maker) => !own.includes(maker.id) && maker.crafts.some((craft) => craft.craftId === craftId))
      .map((maker) => [maker.id, ...own.slice(1)]);
    return [
      { value: ENGINE, label: 'Whoever suits the plan' },
      ...[own, ...others].map((ids) => ({ value: ids.join(' '), label: ids.map(this.names.maker).join(' and ') })),
    ];
  }

  private bayChoices(): readonly { readonly value: string; readonly label: string }[] {
    const [place] = this.stage.places;
    if (!place) return [];
    const own = this.placement.bayIds;
    return [
      { value: ENGINE, label: 'Wherever suits the plan' },
      ...place.bayIds.map((bayId) => ({ value: [bayId, ...own.slice(1)].join(' '), label: this.names.bay(bayId) })),
    ];
  }
}

/** The choice that leaves a side to the engine. */
const ENGINE = 'engine';

function readIds(choice: string): string[] | null {
  return choice === ENGINE ? null : choice.split(' ');
}
