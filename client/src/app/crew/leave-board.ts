import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { endpoints, type LeaveView, Note } from '@common/contract';
import { addDays, dayOfInstant } from '@common/time/calendar-day';
import { Api } from '../api';
import { ChoiceField } from '../ui/choice-field';
import { keeps } from '../ui/field-errors';
import { FormSave } from '../ui/form-save';
import { Notice } from '../ui/notice';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { TextField } from '../ui/text-field';
import { DaysPipe } from '../ui/time-pipes';
import { CrewStore } from './crew-store';

/** Leave that is not over yet, of everybody or of one maker, and the form that enters more. */
@Component({
  selector: 'fettle-leave-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, DaysPipe, MatButton, Notice, TextField],
  template: `
    <section class="board stack" aria-labelledby="leave-heading">
      <div class="row-ends">
        <h2 id="leave-heading">Leave</h2>
        @if (canEdit() && !isAdding()) {
          <button matButton type="button" (click)="isAdding.set(true)">Enter leave</button>
        }
      </div>
      @if (isAdding()) {
        <form class="stack" novalidate (submit)="add($event)">
          <div class="fields">
            @if (makerId() === null) {
              <fettle-choice-field label="Maker" [control]="form.controls.makerId" [choices]="makerChoices()" />
            }
            <fettle-text-field label="First day" type="date" [control]="form.controls.from" />
            <fettle-text-field label="Last day" type="date" [control]="form.controls.last" />
            <fettle-text-field label="Note" [control]="form.controls.note" />
          </div>
          @for (sentence of save.messages(); track sentence) {
            <fettle-notice tone="fault" [text]="sentence" />
          }
          <div class="row">
            <button matButton="filled" type="submit" [disabled]="save.busy()">Enter it</button>
            <button matButton type="button" (click)="isAdding.set(false)">Don’t</button>
          </div>
        </form>
      }
      <ul class="plain-list">
        @for (one of ahead(); track one.id) {
          <li class="row-ends">
            <span>
              @if (makerId() === null) {
                <strong>{{ nameOf(one) }}</strong>,
              }
              {{ one.days | days }}
              @if (one.note) {
                <span class="quiet small"> · {{ one.note }}</span>
              }
            </span>
            @if (canEdit()) {
              <button
                matButton
                type="button"
                [attr.aria-label]="'Take out the leave of ' + nameOf(one) + ', ' + (one.days | days)"
                (click)="store.removeLeave(one)"
              >
                Take out
              </button>
            }
          </li>
        } @empty {
          <li class="quiet">None ahead.</li>
        }
      </ul>
    </section>
  `,
  styles: `
    li {
      border-top: 1px solid var(--rule);
      padding-block: var(--space-1);
      min-height: 2.5rem;
    }
    li:first-child {
      border-top: 0;
    }
  `,
})
export class LeaveBoard {
  private readonly api = inject(Api);
  private readonly clock = inject(STUDIO_CLOCK);

  readonly canEdit = input(false);
  /** Whose leave; null for everybody's. */
  readonly makerId = input<string | null>(null);

  protected readonly store = inject(CrewStore);
  protected readonly isAdding = signal(false);
  protected readonly save = new FormSave();
  protected readonly form = inject(NonNullableFormBuilder).group({
    makerId: [''],
    from: ['', Validators.required],
    last: ['', Validators.required],
    note: ['', keeps(Note)],
  });
  protected readonly makerChoices = computed(() =>
    this.store.active().map((maker) => ({ value: maker.id, label: maker.name })),
  );
  protected readonly ahead = computed(() => {
    const today = dayOfInstant(Math.floor(this.clock.now() / 60_000), this.clock.zone());
    const whose = this.makerId();
    return (this.store.leave.value() ?? [])
      .filter((one) => one.days.until > today && (whose === null || one.makerId === whose))
      .toSorted((a, b) => a.days.from.localeCompare(b.days.from));
  });

  protected nameOf(leave: LeaveView): string {
    return this.store.makers.value()?.find((maker) => maker.id === leave.makerId)?.name ?? 'somebody';
  }

  protected async add(event: Event): Promise<void> {
    event.preventDefault();
    const { makerId, from, last, note } = this.form.getRawValue();
    const whose = this.makerId() ?? makerId;
    if (whose === '') {
      this.save.say('Say whose leave it is.');
      return;
    }
    const entered = await this.save.run(
      this.form,
      () =>
        this.api.callEndpoint(endpoints.createLeave, {
          body: { makerId: whose, days: { from, until: addDays(last, 1) }, note },
        }),
      (path) => (path[0] === 'days' ? [path[1] === 'until' ? 'last' : 'from'] : path),
    );
    if (entered) {
      this.form.reset();
      this.isAdding.set(false);
      this.store.leave.reload();
    }
  }
}
