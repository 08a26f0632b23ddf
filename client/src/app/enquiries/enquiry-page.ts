import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { Confirm } from '../ui/confirm';
import { MarkChip } from '../ui/mark-chip';
import { Moment } from '../ui/moment';
import { Notice } from '../ui/notice';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { HoursPipe } from '../ui/time-pipes';
import { EnquiryStore } from './enquiry-store';
import { PromiseWay } from './parts/promise-way';
import { ShortageBoard } from './parts/shortage-board';
import { askedFor, sayAge } from './say-promise';

const QUESTIONS = {
  committed: {
    title: 'Commit to it?',
    text: 'It counts as promised from now on. The working plan stays as it is until you level it.',
    action: 'Commit to it',
  },
  declined: {
    title: 'Decline it?',
    text: 'It leaves the plan. It can be made tentative again on its own page.',
    action: 'Decline it',
  },
} as const;

/** One enquiry: what is asked, when it could be delivered, and what that would push. */
@Component({
  selector: 'fettle-enquiry-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    HoursPipe,
    MarkChip,
    MatButton,
    MatProgressBar,
    Moment,
    Notice,
    PageHeading,
    PromiseWay,
    RouterLink,
    ShortageBoard,
    StatePanel,
  ],
  providers: [EnquiryStore],
  templateUrl: './enquiry-page.html',
  styleUrl: './enquiry-page.scss',
})
export class EnquiryPage {
  private readonly confirm = inject(Confirm);
  private readonly clock = inject(STUDIO_CLOCK);
  protected readonly store = inject(EnquiryStore);

  /** From the address. */
  readonly id = input.required<string>();

  protected readonly names = KEY_DATE_NAMES;
  protected readonly isOpen = computed(() => this.store.read.value()?.state === 'tentative');
  protected readonly asked = computed(() => askedFor(this.store.read.value()?.keyDates ?? []));
  protected readonly age = computed(() => sayAge(this.store.promise()?.startedAt ?? '', this.clock.now()));

  constructor() {
    effect(() => this.store.show(this.id()));
  }

  protected async settle(state: 'committed' | 'declined'): Promise<void> {
    if (await this.confirm.ask(QUESTIONS[state])) await this.store.settle(state);
  }
}
