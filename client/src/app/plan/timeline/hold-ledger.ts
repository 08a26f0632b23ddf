import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { sayUnmet } from '@common/planning';
import { formatDayAndTime } from '@common/time/format-instant';
import { marginState } from '../date-margins';
import { PlanStore } from '../plan-store';
import { sayLoss, sayMarginChange } from '../wording/say-margin';
import { sayList } from '../wording/say-stage';
import { BoardStore } from './board-store';
import { HoldStore } from './hold-store';
import { unmetAdded } from './unmet-added';

/** Lines that the ledger has room for; the rest is counted. */
const LINES = 5;

/** While a stage is in hand: where it is aimed, what follows it, and which dates pay. Read aloud as it changes. */
@Component({
  selector: 'fettle-hold-ledger',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  templateUrl: './hold-ledger.html',
  styleUrl: './hold-ledger.scss',
})
export class HoldLedger {
  private readonly plan = inject(PlanStore);
  private readonly board = inject(BoardStore);
  protected readonly hand = inject(HoldStore);

  protected readonly byKeys = computed(() => this.hand.hold()?.by === 'keys');
  protected readonly stage = computed(() => {
    const hold = this.hand.hold();
    return hold ? (this.plan.names()?.stage(hold.stageId) ?? '') : '';
  });
  /** "Tue 8 Dec 10:15, Tom Varga". */
  protected readonly aimed = computed(() => {
    const hold = this.hand.hold();
    const names = this.plan.names();
    const place = this.hand.place() ?? hold?.origin;
    if (!place || !names) return '';
    const who = sayList((place.makerIds ?? []).map(names.maker));
    const where = sayList((place.bayIds ?? []).map(names.bay));
    return [formatDayAndTime(place.start, this.board.zone()), who, where].filter((part) => part !== '').join(', ');
  });
  protected readonly following = computed(() => {
    const others = this.hand.moved().size - (this.hand.moved().has(this.hand.hold()?.stageId ?? '') ? 1 : 0);
    if (others <= 0) return this.hand.trial() ? 'Nothing else moves.' : '';
    return others === 1 ? 'One other stage follows.' : `${others} other stages follow.`;
  });
  protected readonly lines = computed(() =>
    this.hand
      .ledger()
      .slice(0, LINES)
      .map((change) => ({
        id: change.keyDate.id,
        name: this.plan.names()?.keyDateInFull(change.keyDate.id) ?? '',
        margin: sayMarginChange(change),
        loss: sayLoss(change),
        state: marginState(change.after),
        gains: change.after !== null && change.before !== null && change.after > change.before,
      })),
  );
  protected readonly more = computed(() => Math.max(0, this.hand.ledger().length - LINES));
  protected readonly broken = computed(() => {
    const names = this.plan.names();
    const view = this.plan.view();
    const trial = this.hand.trial();
    if (!names || !view || !trial) return [];
    const added = unmetAdded(view.unmet, trial.unmet).filter((one) => one.rule !== 'key-date');
    return added.slice(0, 3).map((one) => sayUnmet(one, names, (at) => formatDayAndTime(at, view.zone)));
  });
  /** All of it in one breath, for those who listen. */
  protected readonly narration = computed(() => {
    if (this.hand.trial() === null) return this.byKeys() ? `${this.stage()} in hand. ${this.aimed()}.` : '';
    const dates = this.lines().map((line) => `${line.name}: ${line.margin}`);
    const paying = dates.length > 0 ? `${dates.join('. ')}.` : 'No date changes.';
    return [`${this.aimed()}.`, this.following(), paying, ...this.broken()].join(' ');
  });
}
