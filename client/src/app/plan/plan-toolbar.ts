import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatButtonToggle, MatButtonToggleGroup } from '@angular/material/button-toggle';
import { MatTooltip } from '@angular/material/tooltip';
import { formatDayAndTime } from '@common/time/format-instant';
import { minuteOf } from '../ui/say-time';
import { PlanStore } from './plan-store';
import { BoardStore } from './timeline/board-store';
import type { RowsBy } from './timeline/engine/board-rows';
import { nearestZoomName, ZOOM_NAMES, ZOOM_PX, type ZoomName } from './timeline/engine/zoom';

const ROW_WORDS: readonly { readonly by: RowsBy; readonly word: string }[] = [
  { by: 'piece', word: 'Pieces' },
  { by: 'maker', word: 'Makers' },
  { by: 'bay', word: 'Bays' },
];
const ZOOM_WORDS: Readonly<Record<ZoomName, string>> = {
  hours: 'Hours',
  days: 'Days',
  weeks: 'Weeks',
  months: 'Months',
};
/** One press of a zoom button. */
const ZOOM_STEP = 1.5;

/** What the plan is, what can be done with all of it, and how the wall is looked at. */
@Component({
  selector: 'fettle-plan-toolbar',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatButtonToggle, MatButtonToggleGroup, MatTooltip],
  templateUrl: './plan-toolbar.html',
  styleUrl: './plan-toolbar.scss',
})
export class PlanToolbar {
  protected readonly plan = inject(PlanStore);
  protected readonly board = inject(BoardStore);

  readonly small = input(false);
  readonly levelState = input<'none' | 'under-way' | 'found'>('none');
  readonly level = output();
  readonly evenOut = output();
  readonly issue = output();
  readonly toNow = output();
  readonly showUnmet = output();

  protected readonly rowWords = ROW_WORDS;
  protected readonly zooms = ZOOM_NAMES.map((name) => ({ name, word: ZOOM_WORDS[name] }));
  protected readonly zoomName = computed(() => nearestZoomName(this.board.zoom()));
  protected readonly state = computed(() => {
    const view = this.plan.view();
    if (!view) return '';
    const when = formatDayAndTime(minuteOf(view.changedAt), view.zone);
    const changed = `${view.label}, ${when}${view.changedBy ? ` by ${view.changedBy}` : ''}`;
    if (!view.issued) return `${changed} · nothing issued yet`;
    const issued = view.issued.differs
      ? `differs from issued plan ${view.issued.number}`
      : `same as issued plan ${view.issued.number}`;
    return `${changed} · ${issued}`;
  });
  protected readonly levelWord = computed(
    () => ({ none: 'Level', 'under-way': 'Levelling…', found: 'See what was found' })[this.levelState()],
  );
  protected readonly unmetCount = computed(() => this.plan.view()?.unmet.length ?? 0);

  protected zoomTo(name: ZoomName): void {
    this.board.setZoom(ZOOM_PX[name]);
  }

  protected zoomBy(direction: 1 | -1): void {
    this.board.setZoom(this.board.zoom() * ZOOM_STEP ** direction);
  }

  protected toggleNights(): void {
    this.board.setNights(this.board.nights() === 'folded' ? 'whole' : 'folded');
  }
}
