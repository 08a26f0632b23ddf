import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatButtonToggle, MatButtonToggleGroup } from '@angular/material/button-toggle';
import { dayOfInstant, mondayOf } from '@common/time/calendar-day';
import { ChoiceField, choicesOf } from '../choice-field';
import { FieldErrorPipe } from '../field-errors';
import { STUDIO_CLOCK } from '../studio-clock';
import { TextField } from '../text-field';
import { type PatternRows, patternRow, usualPattern } from './pattern-form';
import { WEEKDAYS } from './say-rule';

/** The patterns of a maker or of a bay: the days and hours that come again, each week, every other week, or by a rule. */
@Component({
  selector: 'fettle-patterns-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    ChoiceField,
    FieldErrorPipe,
    MatButton,
    MatButtonToggle,
    MatButtonToggleGroup,
    ReactiveFormsModule,
    TextField,
  ],
  template: `
    @for (row of rows().controls; track row; let index = $index) {
      <fieldset>
        <legend class="visually-hidden">Pattern {{ index + 1 }}</legend>
        <div class="fields">
          <fettle-choice-field label="Comes again" [control]="row.controls.shape" [choices]="shapes" />
          @if (withOvertime()) {
            <fettle-choice-field label="As" [control]="row.controls.kind" [choices]="kinds" />
          }
        </div>
        @if (row.controls.shape.value === 'rule') {
          <fettle-text-field
            label="Rule"
            [control]="row.controls.rule"
            hint="As iCalendar writes it (RFC 5545): FREQ=MONTHLY;BYDAY=1SA"
          />
        } @else {
          <mat-button-toggle-group
            multiple
            aria-label="Days of the week"
            [formControl]="row.controls.days"
            hideMultipleSelectionIndicator
          >
            @for (day of weekdays; track day.code) {
              <mat-button-toggle [value]="day.code">{{ day.short }}</mat-button-toggle>
            }
          </mat-button-toggle-group>
        }
        @if (row.touched && row.errors; as wrong) {
          <p class="fault" role="alert">{{ wrong | fieldError }}</p>
        }
        <div class="fields">
          <fettle-text-field label="From" type="time" [control]="row.controls.from" />
          <fettle-text-field
            label="Until"
            type="time"
            [control]="row.controls.until"
            hint="Earlier than “from” is the next day."
          />
          <fettle-text-field
            [label]="row.controls.shape.value === 'alternate' ? 'First week is the one of' : 'From the day'"
            type="date"
            [control]="row.controls.firstDay"
          />
          <fettle-text-field label="Except on" [control]="row.controls.exceptDays" hint="2026-12-24, 2026-12-31" />
        </div>
        <button matButton type="button" (click)="rows().removeAt(index)">
          Remove<span class="visually-hidden"> pattern {{ index + 1 }}</span>
        </button>
      </fieldset>
    } @empty {
      <p class="quiet">{{ emptyHint() }}</p>
    }
    <button matButton="outlined" type="button" (click)="add()">{{ addWords() }}</button>
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--space-3);
      justify-items: start;
      grid-template-columns: minmax(0, 1fr);
    }
    fieldset {
      display: grid;
      gap: var(--space-3);
      width: 100%;
      min-width: 0;
      margin: 0;
      padding: var(--space-3);
      border: 1px solid var(--rule);
      border-radius: var(--corner);
      justify-items: start;
      grid-template-columns: minmax(0, 1fr);
    }
    .fields {
      width: 100%;
    }
    fettle-text-field {
      width: 100%;
    }
    .fault {
      color: var(--fault);
    }
    mat-button-toggle-group {
      flex-wrap: wrap;
    }
  `,
})
export class PatternsField {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly rows = input.required<PatternRows>();
  readonly emptyHint = input('None yet.');
  readonly addWords = input('Add a pattern');
  /** Whether a pattern may be time that is worked only at the overtime price. */
  readonly withOvertime = input(false);

  protected readonly weekdays = WEEKDAYS;
  protected readonly shapes = choicesOf({
    weekly: 'Every week',
    alternate: 'Every other week',
    rule: 'By a rule of its own',
  });
  protected readonly kinds = choicesOf({ ordinary: 'Ordinary hours', overtime: 'Overtime, if asked' });

  protected add(): void {
    const today = dayOfInstant(Math.floor(this.clock.now() / 60_000), this.clock.zone());
    this.rows().push(patternRow(usualPattern(mondayOf(today))));
  }
}
