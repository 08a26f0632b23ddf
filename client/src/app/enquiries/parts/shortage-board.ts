import { ChangeDetectionStrategy, Component, computed, effect, input, linkedSignal } from '@angular/core';
import { FormControl } from '@angular/forms';
import type { PromiseAnswer, ShortRowView } from '@common/contract';
import { formatDay } from '@common/time/format-instant';
import { ChoiceField } from '../../ui/choice-field';
import { Plot } from '../../ui/plot/plot';
import { sayHours } from '../../ui/say-time';
import { drawShortage } from '../draw-shortage';

/** Which crafts and bays are short in which weeks: a sentence, and for one of them a plot with its table. */
@Component({
  selector: 'fettle-shortage-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, Plot],
  template: `
    <h3>Where the studio is short</h3>
    <p>{{ summary() }}</p>
    @if (row(); as one) {
      <fettle-choice-field
        label="Craft or bay"
        [control]="chosen"
        [choices]="choices()"
        (chosen)="id.set(chosen.value)"
      />
      <fettle-plot
        [label]="'Hours by week, ' + one.name + ': what is taken, the enquiry upon it, and what there is'"
        [draw]="draw()"
      />
      <p class="small quiet">
        Plain: taken already. Striped: the enquiry, had it the studio to itself. Dashed line: what there is.
      </p>
      <div class="wide" tabindex="0" role="group" [attr.aria-label]="one.name + ' by week'">
        <table>
          <thead>
            <tr>
              <th scope="col">Week of</th>
              <th scope="col">Taken</th>
              <th scope="col">Enquiry</th>
              <th scope="col">There is</th>
              <th scope="col">Short</th>
            </tr>
          </thead>
          <tbody>
            @for (line of lines(); track line.week) {
              <tr>
                <th scope="row">{{ line.week }}</th>
                <td class="figures">{{ line.taken }}</td>
                <td class="figures">{{ line.asked }}</td>
                <td class="figures">{{ line.capacity }}</td>
                <td class="figures">
                  @if (line.short) {
                    <strong>{{ line.short }} short</strong>
                  } @else {
                    –
                  }
                </td>
              </tr>
            }
          </tbody>
        </table>
      </div>
    }
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }
    .wide {
      overflow-x: auto;
    }
    th,
    td {
      padding: var(--space-1) var(--space-3) var(--space-1) 0;
      text-align: start;
    }
  `,
})
export class ShortageBoard {
  readonly shortages = input.required<PromiseAnswer['shortages']>();

  private readonly rows = computed(() =>
    [...this.shortages().crafts, ...this.shortages().bays].toSorted((a, b) => shortOf(b) - shortOf(a)),
  );
  protected readonly id = linkedSignal(() => this.rows().at(0)?.id ?? '');
  protected readonly row = computed(() => this.rows().find(({ id }) => id === this.id()) ?? null);
  protected readonly chosen = new FormControl('', { nonNullable: true });

  protected readonly choices = computed(() => this.rows().map(({ id, name }) => ({ value: id, label: name })));
  protected readonly draw = computed(() => drawShortage(this.row() ?? NOTHING, this.shortages().weeks));
  protected readonly summary = computed(() => {
    const short = this.rows().filter((row) => shortOf(row) > 0);
    if (short.length === 0) return 'Nowhere: what it asks fits into what every craft and bay has left.';
    return short.map((row) => `${row.name}: ${sayHours(shortOf(row))} short`).join(' · ');
  });
  protected readonly lines = computed(() => {
    const row = this.row();
    if (!row) return [];
    return this.shortages().weeks.map((week, k) => ({
      week: formatDay(week),
      taken: sayHours(row.takenMinutes[k]),
      asked: sayHours(row.askedMinutes[k]),
      capacity: sayHours(row.capacityMinutes[k]),
      short: row.shortMinutes[k] > 0 ? sayHours(row.shortMinutes[k]) : '',
    }));
  });

  constructor() {
    effect(() => this.chosen.setValue(this.id()));
  }
}

const NOTHING: ShortRowView = {
  id: '',
  name: '',
  takenMinutes: [],
  askedMinutes: [],
  capacityMinutes: [],
  shortMinutes: [],
};

function shortOf(row: ShortRowView): number {
  return row.shortMinutes.reduce((sum, minutes) => sum + minutes, 0);
}
