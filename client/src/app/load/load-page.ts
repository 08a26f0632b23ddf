import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButtonToggle, MatButtonToggleGroup } from '@angular/material/button-toggle';
import { Router } from '@angular/router';
import { endpoints } from '@common/contract';
import { onLiveEvent, readEndpoint } from '../api';
import { PageHeading } from '../ui/page-heading';
import { sayHours } from '../ui/say-time';
import { StatePanel } from '../ui/state-panel';
import { type Grain, GRAINS, loadTable } from './load-cells';
import { VesselCell } from './vessel-cell';

const BY = ['craft', 'maker', 'bay'] as const;
type By = (typeof BY)[number];
const BY_WORDS: Readonly<Record<By, string>> = { craft: 'Crafts', maker: 'Makers', bay: 'Bays' };
const GRAIN_WORDS: Readonly<Record<Grain, string>> = { day: 'Days', week: 'Weeks', month: 'Months' };
/** Stretches drawn at once; what lies further is a press away. */
const MOST_STRETCHES: Readonly<Record<Grain, number>> = { day: 30, week: 26, month: 18 };

/** Hours against capacity by craft, maker or bay: a table of vessels, each with its figures. */
@Component({
  selector: 'fettle-load-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButtonToggle, MatButtonToggleGroup, PageHeading, StatePanel, VesselCell],
  templateUrl: './load-page.html',
  styleUrl: './load-page.scss',
})
export class LoadPage {
  private readonly router = inject(Router);

  /** From the address: whose load, and how long a stretch. */
  readonly by = input<string>();
  readonly grain = input<string>();

  protected readonly byNow = computed<By>(() => BY.find((one) => one === this.by()) ?? 'craft');
  protected readonly grainNow = computed<Grain>(() => GRAINS.find((one) => one === this.grain()) ?? 'week');
  protected readonly byWords = BY.map((by) => ({ by, word: BY_WORDS[by] }));
  protected readonly grainWords = GRAINS.map((grain) => ({ grain, word: GRAIN_WORDS[grain] }));
  protected readonly read = readEndpoint(endpoints.readLoad, () => ({ query: { by: this.byNow() } }));
  protected readonly table = computed(() => {
    const view = this.read.value();
    if (!view) return null;
    const grain = this.grainNow();
    const table = loadTable(view, grain);
    const stretches = table.stretches.slice(0, MOST_STRETCHES[grain]);
    const rows = table.rows.map((row) => {
      const cells = row.cells.slice(0, stretches.length);
      const tallest = cells.reduce(
        (most, cell) => Math.max(most, cell.capacityMinutes, cell.committedMinutes + cell.tentativeMinutes),
        1,
      );
      return { ...row, cells, tallest };
    });
    return { stretches, rows };
  });
  protected readonly lead = computed(() => {
    const table = this.table();
    if (!table) return '';
    const over = table.rows
      .map((row) => ({ name: row.name, minutes: row.cells.reduce((sum, cell) => sum + cell.overMinutes, 0) }))
      .filter((row) => row.minutes > 0)
      .sort((a, b) => b.minutes - a.minutes);
    if (over.length === 0) return 'No day asks for more than there is.';
    return over
      .slice(0, 4)
      .map((row) => `${row.name}: ${sayHours(row.minutes)} over`)
      .join(' · ');
  });

  constructor() {
    onLiveEvent((event) => {
      if (event === null || event.kind === 'plan-revised' || event.kind === 'record-changed') this.read.reload();
    });
  }

  protected go(queryParams: { readonly by?: By; readonly grain?: Grain }): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
