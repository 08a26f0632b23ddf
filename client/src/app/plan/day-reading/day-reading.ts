import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { formatDay, formatInstant, formatMinutes } from '@common/time/format-instant';
import { MarkChip } from '../../ui/mark-chip';
import { hueColour } from '../../ui/production-hues';
import { PlanStore } from '../plan-store';
import { BoardStore } from '../timeline/board-store';
import { sayMargin } from '../wording/say-margin';
import { sayKind, sayList, sayProgress } from '../wording/say-stage';
import { type DayEntry, type DayWork, readDays } from './read-days';

/** Days read at once; more on asking. */
const DAYS_AT_ONCE = 10;

const GOES_ON: Readonly<Record<DayWork['goesOn'], string>> = {
  whole: '',
  begins: 'goes on the next day',
  continues: 'goes on all day',
  ends: 'from the day before',
};

/** The plan for a small screen: day by day, what is done, what turns firm, which date falls. */
@Component({
  selector: 'fettle-day-reading',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarkChip, MatButton],
  templateUrl: './day-reading.html',
  styleUrl: './day-reading.scss',
})
export class DayReading {
  private readonly plan = inject(PlanStore);
  private readonly board = inject(BoardStore);

  readonly selected = input<string | null>(null);
  readonly chosen = output<string>();

  private readonly most = signal(DAYS_AT_ONCE);
  private readonly entries = computed(() => {
    const view = this.plan.view();
    return view ? readDays(view, this.plan.margins(), this.most() + 1) : [];
  });
  protected readonly more = computed(() => this.entries().length > this.most());
  protected readonly days = computed(() =>
    this.entries()
      .slice(0, this.most())
      .map((entry) => this.tell(entry)),
  );

  protected showMore(): void {
    this.most.update((most) => most + DAYS_AT_ONCE);
  }

  private tell(entry: DayEntry) {
    const names = this.plan.names();
    const zone = this.board.zone();
    const clock = (at: number): string => formatInstant(at, zone).slice(-5);
    const placements = new Map(this.plan.view()?.plan.placements.map((one) => [one.stageId, one]));
    return {
      day: entry.day,
      title: formatDay(entry.day),
      dates: entry.dates.map((one) => ({
        id: one.keyDate.id,
        hard: one.keyDate.strength === 'hard',
        text: `${names?.keyDateInFull(one.keyDate.id)}, ${clock(one.keyDate.at)}`,
        margin: sayMargin(one.marginMinutes),
        late: (one.marginMinutes ?? 0) < 0,
      })),
      work: entry.work.flatMap((work) => {
        const face = this.board.faces().get(work.stageId);
        const placement = placements.get(work.stageId);
        if (!face || !placement) return [];
        const crew = sayList([...new Set(placement.crew.map((one) => names?.maker(one.makerId) ?? ''))]);
        const where = sayList(placement.bayIds.map((id) => names?.bay(id) ?? ''));
        return [
          {
            id: work.stageId,
            face,
            edge: hueColour(face.hue),
            when:
              work.span.end > work.span.start
                ? `${clock(work.span.start)}–${clock(work.span.end)}`
                : clock(work.span.start),
            who: [crew, where].filter((part) => part !== '').join(' · '),
            notes: [sayKind(face.kind), GOES_ON[work.goesOn], sayProgress(face), face.tentative ? 'tentative' : '']
              .filter((part) => part !== '')
              .join(' · '),
            sets: this.saySets(placement.dwellEnd, placement.work[placement.work.length - 1].end),
          },
        ];
      }),
      firm: entry.firm.map((one) => ({
        id: one.stageId,
        text: `${clock(one.at)} ${names?.stage(one.stageId)} is firm`,
      })),
    };
  }

  private saySets(dwellEnd: number, workEnd: number): string {
    return dwellEnd > workEnd ? `then sets for ${formatMinutes(dwellEnd - workEnd)}` : '';
  }
}
