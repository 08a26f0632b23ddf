import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { Move } from '@common/planning';
import { formatDayAndTime } from '@common/time/format-instant';
import { dateChanges, dateMargins } from '../date-margins';
import { PlanStore } from '../plan-store';
import { PlanningLine } from '../planning-worker/planning-line';
import type { Trial } from '../planning-worker/protocol';
import { otherBays, otherCrews } from '../timeline/engine/take-targets';
import { workStart } from '../timeline/engine/tape';
import { unmetAdded } from '../timeline/unmet-added';
import { sayLoss } from '../wording/say-margin';

/** Another maker or bay for a stage, and what would come of it. */
interface OtherWay {
  readonly key: string;
  readonly words: string;
  readonly move: Move;
  readonly outcome: string;
  readonly breaks: number;
}

/** More ways than these are not tried at once. */
const MOST_TRIED = 12;

/** What else a stage could do: who else could take it and where else it could be done, each tried out on the plan. */
@Component({
  selector: 'fettle-other-ways',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  templateUrl: './other-ways.html',
  styles: `
    li {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      gap: 0 var(--space-2);
      align-items: center;
      padding-block: var(--space-1);
      border-bottom: 1px dotted var(--rule);
    }
    .outcome {
      grid-column: 1;
      font-size: 0.8125rem;
      color: var(--graphite);
    }
    button {
      grid-area: 1 / 2 / 3 / 3;
    }
  `,
})
export class OtherWays {
  private readonly plan = inject(PlanStore);
  private readonly line = inject(PlanningLine);

  readonly stageId = input.required<string>();

  protected readonly ways = signal<readonly OtherWay[] | null>(null);
  protected readonly trying = signal(false);
  protected readonly failure = signal<string | null>(null);
  protected readonly busy = computed(() => this.plan.busy() !== null);

  constructor() {
    // What was found out about one stage, or about a plan that has changed, says nothing about another.
    effect(() => {
      this.stageId();
      this.plan.view();
      untracked(() => {
        this.ways.set(null);
        this.failure.set(null);
      });
    });
  }

  protected async tryAll(): Promise<void> {
    const stageId = this.stageId();
    const revision = this.plan.view()?.revision;
    const candidates = this.candidates();
    this.trying.set(true);
    const answer = await this.line.ask({ kind: 'try-moves', moves: candidates.map((one) => one.move) });
    this.trying.set(false);
    if (stageId !== this.stageId() || revision !== this.plan.view()?.revision) return;
    if (answer.kind === 'tried') {
      const ways = candidates.map((one, index) => ({ ...one, ...this.weigh(stageId, answer.trials[index]) }));
      this.ways.set(ways.sort((a, b) => a.breaks - b.breaks));
    } else if (answer.kind === 'failed') {
      this.failure.set(answer.message);
    }
  }

  protected async take(way: OtherWay): Promise<void> {
    const start = this.plan.view()?.plan.placements.find((one) => one.stageId === way.move.stageId);
    if (!start) return;
    await this.plan.moveStage(way.move.stageId, { ...way.move, start: way.move.start ?? workStart(start) });
  }

  private candidates(): { readonly key: string; readonly words: string; readonly move: Move }[] {
    const view = this.plan.view();
    const names = this.plan.names();
    const stage = view?.problem.stages.find((one) => one.id === this.stageId());
    const placement = view?.plan.placements.find((one) => one.stageId === this.stageId());
    if (!view || !names || !stage || !placement) return [];
    const stay = { stageId: stage.id, start: workStart(placement), makerIds: null, bayIds: null };
    const crews = otherCrews(view.problem, placement).map(({ makerId, makerIds }) => ({
      key: `maker:${makerId}`,
      words: `With ${names.maker(makerId)}`,
      move: { ...stay, makerIds },
    }));
    const bays = otherBays(stage, placement).map(({ bayId, bayIds }) => ({
      key: `bay:${bayId}`,
      words: `At ${names.bay(bayId)}`,
      move: { ...stay, bayIds },
    }));
    return [...crews, ...bays].slice(0, MOST_TRIED);
  }

  private weigh(stageId: string, trial: Trial): Pick<OtherWay, 'outcome' | 'breaks'> {
    const view = this.plan.view();
    const names = this.plan.names();
    if (!view || !names) return { outcome: '', breaks: 0 };
    const moved = new Set(trial.moved);
    const after = {
      placements: [...view.plan.placements.filter((one) => !moved.has(one.stageId)), ...trial.placements],
    };
    const changes = dateChanges(this.plan.margins(), dateMargins(view.problem, after));
    const breaks = unmetAdded(view.unmet, trial.unmet).length;
    const placement = after.placements.find((one) => one.stageId === stageId);
    const start = placement ? formatDayAndTime(workStart(placement), view.zone) : 'finds no place';
    const dates = changes.slice(0, 2).map((change) => `${names.keyDateInFull(change.keyDate.id)} ${sayLoss(change)}`);
    const broken = breaks === 0 ? [] : [breaks === 1 ? 'one rule would break' : `${breaks} rules would break`];
    const others = Math.max(0, trial.moved.filter((id) => id !== stageId).length);
    const follow =
      others === 0 ? 'nothing else moves' : `${others} ${others === 1 ? 'stage follows' : 'stages follow'}`;
    return { outcome: [start, ...dates, follow, ...broken].join(' · '), breaks };
  }
}
