import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButtonToggle, MatButtonToggleGroup } from '@angular/material/button-toggle';
import { formatDay } from '@common/time/format-instant';
import { sayHours } from '../../ui/say-time';
import { InsightStore } from '../insight-store';
import { PlanStore } from '../plan-store';
import { BoardStore } from '../timeline/board-store';
import { HEAD_WIDTH } from '../timeline/timeline';
import { pourVessels, type Vessel, VESSEL_ROW_HEIGHT, type VesselRow } from './vessels';

/** Days that the table shows at once. */
const TABLE_DAYS = 10;

/** Each craft's hours against its capacity, day by day, on the wall's own time axis; as vessels or as a table. */
@Component({
  selector: 'fettle-load-strip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButtonToggle, MatButtonToggleGroup],
  templateUrl: './load-strip.html',
  styleUrl: './load-strip.scss',
  host: { '[style.--head-width.px]': 'headWidth' },
})
export class LoadStrip {
  private readonly plan = inject(PlanStore);
  private readonly insight = inject(InsightStore);
  protected readonly board = inject(BoardStore);

  protected readonly headWidth = HEAD_WIDTH;
  protected readonly rowHeight = VESSEL_ROW_HEIGHT;
  protected readonly view = signal<'vessels' | 'table'>('vessels');
  protected readonly failure = this.insight.failure;
  protected readonly fresh = this.insight.fresh;
  private readonly poured = computed(() =>
    pourVessels({
      rows: this.insight.load(),
      days: this.board.days(),
      lit: this.board.lit(),
      scale: this.board.scale(),
    }),
  );
  /** Rows with the vessels that are in the window. */
  protected readonly rows = computed(() => {
    const { left, right } = this.board.drawn();
    return this.poured().map((row) => ({
      ...row,
      name: this.nameOf(row),
      vessels: row.vessels.filter((vessel) => vessel.x < right && vessel.x + vessel.width > left),
    }));
  });
  protected readonly tableDays = computed(() => {
    const from = this.board.from();
    return this.board
      .days()
      .filter((day) => day.end > from && this.worksOn(day.day))
      .slice(0, TABLE_DAYS);
  });
  protected readonly tableRows = computed(() =>
    this.poured().map((row) => {
      const byDay = new Map(row.vessels.map((vessel) => [vessel.day, vessel]));
      return { id: row.id, name: this.nameOf(row), cells: this.tableDays().map((day) => byDay.get(day.day) ?? null) };
    }),
  );
  protected readonly summary = computed(() => {
    const over = this.poured().filter((row) => row.overMinutes > 0);
    if (over.length === 0) return 'Nobody is asked for more than there is.';
    return over.map((row) => `${this.nameOf(row)}: ${sayHours(row.overMinutes)} over`).join(' · ');
  });

  protected hours(minutes: number): string {
    return sayHours(minutes);
  }

  protected dayName(day: string): string {
    return formatDay(day);
  }

  protected sayVessel(name: string, vessel: Vessel): string {
    const over = vessel.overMinutes > 0 ? `, ${sayHours(vessel.overMinutes)} over` : '';
    return `${name}, ${formatDay(vessel.day)}: ${sayHours(vessel.loadMinutes)} of ${sayHours(vessel.capacityMinutes)}${over}`;
  }

  /** The walls and floor of a vessel, open at the top. */
  protected outline(vessel: Vessel): string {
    const floor = VESSEL_ROW_HEIGHT - 1;
    const brim = floor - vessel.brim;
    return `M0.5 ${brim} V${floor} H${vessel.width - 0.5} V${brim}`;
  }

  private nameOf(row: VesselRow): string {
    return this.plan.view()?.directory.crafts.find((craft) => craft.id === row.id)?.name ?? 'A craft';
  }

  private worksOn(day: string): boolean {
    return this.poured().some((row) => row.vessels.some((vessel) => vessel.day === day));
  }
}
