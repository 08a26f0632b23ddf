import {
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  input,
  output,
  viewChild,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { MILESTONE_NAMES, type MaterialMilestone } from '@common/domain/material';
import { sayReason, sayUnmet } from '@common/planning';
import { formatDayAndTime, formatMinutes } from '@common/time/format-instant';
import { MarkChip } from '../../ui/mark-chip';
import { Notice } from '../../ui/notice';
import { sayHours } from '../../ui/say-time';
import { InsightStore } from '../insight-store';
import { PlanStore } from '../plan-store';
import { BoardStore } from '../timeline/board-store';
import { holdable } from '../timeline/engine/take-targets';
import { workEnd, workStart } from '../timeline/engine/tape';
import { sayMargin } from '../wording/say-margin';
import { sayUnholdable } from '../wording/say-refusal';
import { sayKind, sayList, sayProgress } from '../wording/say-stage';
import { OtherWays } from './other-ways';

/** One stage looked at closely: what it is, why it is there, what hangs on it, and what can be done with it. */
@Component({
  selector: 'fettle-inspector',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarkChip, MatButton, Notice, OtherWays, RouterLink],
  templateUrl: './inspector.html',
  styleUrl: './inspector.scss',
})
export class Inspector {
  protected readonly plan = inject(PlanStore);
  private readonly insight = inject(InsightStore);
  private readonly board = inject(BoardStore);
  private readonly heading = viewChild<ElementRef<HTMLElement>>('heading');

  readonly stageId = input.required<string>();
  readonly closed = output();
  readonly move = output<string>();
  readonly show = output<string>();

  protected readonly face = computed(() => this.board.faces().get(this.stageId()));
  private readonly stage = computed(() => this.plan.view()?.problem.stages.find((one) => one.id === this.stageId()));
  private readonly entry = computed(() => this.plan.view()?.directory.stages.find((one) => one.id === this.stageId()));
  private readonly placement = computed(() =>
    this.plan.view()?.plan.placements.find((one) => one.stageId === this.stageId()),
  );
  protected readonly kindWord = computed(() => {
    const face = this.face();
    const kind = face ? sayKind(face.kind) : '';
    return kind === '' ? 'Stage' : kind.charAt(0).toUpperCase() + kind.slice(1);
  });
  protected readonly states = computed(() => {
    const face = this.face();
    if (!face) return [];
    return [sayProgress(face), face.tentative ? 'tentative' : ''].filter((word) => word !== '');
  });
  /** Facts in the order in which one asks for them. */
  protected readonly facts = computed<readonly Fact[]>(() => {
    const placement = this.placement();
    const names = this.plan.names();
    const stage = this.stage();
    if (!placement || !names || !stage) return [];
    const start = workStart(placement);
    const end = workEnd(placement);
    const crew = sayList([...new Set(placement.crew.map((one) => `${names.maker(one.makerId)}`))]);
    const minutes = placement.work.reduce((sum, span) => sum + span.end - span.start, 0);
    const hours = stage.crew.length > 0 && minutes > 0 ? ` (${sayHours(minutes)} at it)` : '';
    return [
      { name: 'From', words: this.say(start) },
      ...(end > start ? [{ name: 'To', words: `${this.say(end)}${hours}` }] : []),
      ...(placement.dwellEnd > end
        ? [{ name: 'Sets until', words: `${this.say(placement.dwellEnd)}${this.material()}` }]
        : []),
      ...this.windowFact(end),
      ...(crew === '' ? [] : [{ name: 'Crew', words: crew }]),
      ...(placement.bayIds.length === 0 ? [] : [{ name: 'Where', words: sayList(placement.bayIds.map(names.bay)) }]),
    ];
  });
  protected readonly reasons = computed(() => {
    const names = this.plan.names();
    const reasons = this.insight.reasons().get(this.stageId()) ?? [];
    return names ? reasons.map((reason) => asSentence(sayReason(reason, names, (at) => this.say(at)))) : [];
  });
  protected readonly thinking = computed(() => !this.insight.fresh() && this.insight.failure() === null);
  /** The key dates that this stage drives: it can't be late without them. */
  protected readonly drives = computed(() => {
    const names = this.plan.names();
    const margins = new Map(this.plan.margins().map((one) => [one.keyDate.id, one.marginMinutes]));
    return this.insight
      .chains()
      .filter((chain) => chain.steps.some((step) => step.stageId === this.stageId()))
      .map((chain) => ({
        id: chain.keyDateId,
        name: names?.keyDateInFull(chain.keyDateId) ?? '',
        margin: sayMargin(margins.get(chain.keyDateId) ?? null),
        steps: [...chain.steps].reverse().map((step) => ({ id: step.stageId, name: names?.stage(step.stageId) ?? '' })),
      }));
  });
  protected readonly unmet = computed(() => {
    const names = this.plan.names();
    const mine = this.plan.view()?.unmet.filter((one) => one.stageIds.includes(this.stageId())) ?? [];
    return names ? mine.map((one) => asSentence(sayUnmet(one, names, (at) => this.say(at)))) : [];
  });
  protected readonly cautions = computed(() => this.entry()?.cautions ?? []);
  protected readonly unholdable = computed(() => {
    const stage = this.stage();
    const why = stage ? holdable(stage) : 'yes';
    return why === 'yes' ? null : sayUnholdable(why);
  });
  protected readonly busy = computed(() => this.plan.busy() !== null);

  /** Puts the focus on the heading, as when the inspector was opened by key. */
  focusHeading(): void {
    this.heading()?.nativeElement.focus({ preventScroll: true });
  }

  protected holdHere(): void {
    const placement = this.placement();
    if (!placement) return;
    const makerIds = [...new Set(placement.crew.map((one) => one.makerId))];
    void this.plan.moveStage(placement.stageId, {
      start: workStart(placement),
      makerIds: makerIds.length > 0 ? makerIds : null,
      bayIds: placement.bayIds.length > 0 ? placement.bayIds : null,
    });
  }

  private say(at: number): string {
    return formatDayAndTime(at, this.board.zone());
  }

  private material(): string {
    const entry = this.entry();
    const milestone = entry?.milestone ? MILESTONE_NAMES[entry.milestone as MaterialMilestone] : undefined;
    const words = [entry?.materialName, milestone].filter((word) => word);
    return words.length > 0 ? `, ${words.join(', ')}` : '';
  }

  private windowFact(end: number): Fact[] {
    const window = this.stage()?.dwell?.window;
    if (!window) return [];
    const cost = window.kind === 'soft' ? `, else ${sayHours(window.extraMinutes)} more work` : ', no later';
    return [{ name: 'Window', words: `next within ${formatMinutes(window.minutes)} of ${this.say(end)}${cost}` }];
  }
}

interface Fact {
  readonly name: string;
  readonly words: string;
}

function asSentence(text: string): string {
  const sentence = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(sentence) ? sentence : `${sentence}.`;
}
