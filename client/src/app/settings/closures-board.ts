import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { type ClosureView, endpoints, Name } from '@common/contract';
import { addDays, dayOfInstant } from '@common/time/calendar-day';
import { Api, readEndpoint, reloadOnChange } from '../api';
import { keeps } from '../ui/field-errors';
import { FormSave } from '../ui/form-save';
import { Notice } from '../ui/notice';
import { StatePanel } from '../ui/state-panel';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { TextField } from '../ui/text-field';
import { DaysPipe } from '../ui/time-pipes';
import { Toasts } from '../ui/toasts';

/** The days on which the studio is closed, from today on. */
@Component({
  selector: 'fettle-closures-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [DaysPipe, MatButton, Notice, StatePanel, TextField],
  template: `
    <section class="board stack" aria-labelledby="closures-heading">
      <div class="row-ends">
        <h2 id="closures-heading">Closures</h2>
        @if (!isAdding()) {
          <button matButton type="button" (click)="isAdding.set(true)">Close for some days</button>
        }
      </div>
      @if (isAdding()) {
        <form class="stack" novalidate (submit)="add($event)">
          <fettle-text-field label="Why" [control]="form.controls.name" />
          <div class="fields">
            <fettle-text-field label="First day" type="date" [control]="form.controls.from" />
            <fettle-text-field label="Last day" type="date" [control]="form.controls.last" />
          </div>
          @for (sentence of save.messages(); track sentence) {
            <fettle-notice tone="fault" [text]="sentence" />
          }
          <div class="row">
            <button matButton="filled" type="submit" [disabled]="save.busy()">Close</button>
            <button matButton type="button" (click)="isAdding.set(false)">Don’t</button>
          </div>
        </form>
      }
      <fettle-state-panel
        [read]="closures"
        emptyTitle="Never closed yet"
        emptyHint="Enter public holidays and the summer break: no work is planned on them, but dwells go on."
      >
        <ul class="plain-list">
          @for (one of ahead(); track one.id) {
            <li class="row-ends">
              <span
                ><strong>{{ one.name }}</strong
                >, {{ one.days | days }}</span
              >
              <button matButton type="button" [attr.aria-label]="'Open after all: ' + one.name" (click)="remove(one)">
                Open after all
              </button>
            </li>
          } @empty {
            <li class="quiet">None ahead.</li>
          }
        </ul>
      </fettle-state-panel>
    </section>
  `,
})
export class ClosuresBoard {
  private readonly api = inject(Api);
  private readonly clock = inject(STUDIO_CLOCK);
  private readonly toasts = inject(Toasts);

  protected readonly closures = readEndpoint(endpoints.listClosures);
  protected readonly isAdding = signal(false);
  protected readonly save = new FormSave();
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, keeps(Name)]],
    from: ['', Validators.required],
    last: ['', Validators.required],
  });
  protected readonly ahead = computed(() => {
    const today = dayOfInstant(Math.floor(this.clock.now() / 60_000), this.clock.zone());
    return (this.closures.value() ?? [])
      .filter((one) => one.days.until > today)
      .toSorted((a, b) => a.days.from.localeCompare(b.days.from));
  });

  constructor() {
    reloadOnChange(this.closures, 'closure');
  }

  protected async add(event: Event): Promise<void> {
    event.preventDefault();
    const { name, from, last } = this.form.getRawValue();
    const added = await this.save.run(
      this.form,
      () => this.api.callEndpoint(endpoints.createClosure, { body: { name, days: { from, until: addDays(last, 1) } } }),
      (path) => (path[0] === 'days' ? [path[1] === 'until' ? 'last' : 'from'] : path),
    );
    if (added) {
      this.form.reset();
      this.isAdding.set(false);
      this.closures.reload();
    }
  }

  protected async remove(closure: ClosureView): Promise<void> {
    try {
      await this.api.callEndpoint(endpoints.removeClosure, {
        params: { id: closure.id },
        query: { version: closure.version },
      });
    } catch (error) {
      this.toasts.fail(error);
    }
    this.closures.reload();
  }
}
