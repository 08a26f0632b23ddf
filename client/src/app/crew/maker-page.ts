import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { ReactiveFormsModule } from '@angular/forms';
import { Title } from '@angular/platform-browser';
import { Router, RouterLink } from '@angular/router';
import { endpoints, type MakerView, type Pattern } from '@common/contract';
import { dayOfInstant, mondayOf } from '@common/time/calendar-day';
import { Api } from '../api';
import { ChoiceField } from '../ui/choice-field';
import { VersionedWrites } from '../ui/conflict-dialog';
import { FigureField } from '../ui/figure-field';
import { FormSave } from '../ui/form-save';
import { STUDIO_CURRENCY } from '../ui/money';
import { NoteField } from '../ui/note-field';
import { Notice } from '../ui/notice';
import { PageHeading } from '../ui/page-heading';
import { patternOf, PatternsField, WeekStrip } from '../ui/patterns';
import { FACTOR, HOURS, moneyIn } from '../ui/reads-text';
import { StatePanel } from '../ui/state-panel';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { TextField } from '../ui/text-field';
import { Toasts } from '../ui/toasts';
import { CrewStore } from './crew-store';
import { LeaveBoard } from './leave-board';
import { craftRow, makerBodyOf, makerForm, type MakerForm } from './maker-form';

const LABELS = {
  name: 'Name',
  initials: 'Initials',
  crafts: 'Crafts',
  patterns: 'Patterns',
  hourCostMinor: 'Cost of an hour',
  dayLimitMinutes: 'Most hours a day',
  weekLimitMinutes: 'Most hours a week',
  note: 'Note',
  active: 'Works here',
};

/** One maker: crafts with pace, the week as it comes again, limits, cost and leave; or the form of a new one. */
@Component({
  selector: 'fettle-maker-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    ChoiceField,
    FigureField,
    LeaveBoard,
    MatButton,
    MatCheckbox,
    NoteField,
    Notice,
    PageHeading,
    PatternsField,
    ReactiveFormsModule,
    RouterLink,
    StatePanel,
    TextField,
    WeekStrip,
  ],
  providers: [CrewStore],
  templateUrl: './maker-page.html',
  styleUrl: './maker-page.scss',
})
export class MakerPage {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly router = inject(Router);
  private readonly toasts = inject(Toasts);
  private readonly clock = inject(STUDIO_CLOCK);

  /** From the address; absent for a new maker. */
  readonly id = input<string>();

  protected readonly store = inject(CrewStore);
  protected readonly currency = inject(STUDIO_CURRENCY)();
  protected readonly readers = { factor: FACTOR, hours: HOURS, money: moneyIn(this.currency) };
  protected readonly save = new FormSave();
  protected readonly monday = mondayOf(dayOfInstant(Math.floor(this.clock.now() / 60_000), this.clock.zone()));
  protected readonly maker = computed(() => this.store.makers.value()?.find((one) => one.id === this.id()) ?? null);
  protected readonly form: MakerForm = makerForm(null, this.monday);
  private readonly written = toSignal(this.form.valueChanges);
  private readonly filledVersion = signal(0);

  protected readonly craftChoices = computed(() =>
    (this.store.crafts.value() ?? []).map((craft) => ({ value: craft.id, label: craft.name })),
  );
  /** The patterns as far as they are written rightly: what the strip shows. */
  protected readonly patterns = computed<readonly Pattern[]>(() => {
    this.written();
    return this.form.controls.patterns.controls.filter((row) => row.valid).map(patternOf);
  });

  constructor() {
    const title = inject(Title);
    effect(() => {
      const maker = this.maker();
      if (maker) {
        title.setTitle(`${maker.name} · Fettle`);
        untracked(() => this.fill(maker));
      }
    });
  }

  protected addCraft(): void {
    this.form.controls.crafts.push(craftRow({ craftId: '', pacePermille: 1000 }));
  }

  protected async submit(event: Event): Promise<void> {
    event.preventDefault();
    const saved = await this.save.run(this.form, () => this.send());
    if (saved) {
      this.form.markAsPristine();
      this.toasts.say(`${saved.name} is saved.`);
      await this.router.navigate(['/crew']);
    } else if (saved === null) {
      this.filledVersion.set(0);
      this.store.makers.reload();
    }
  }

  private async send(): Promise<MakerView | null> {
    const maker = this.maker();
    const { active, ...body } = makerBodyOf(this.form);
    if (maker === null) {
      return this.api.callEndpoint(endpoints.createMaker, { body });
    }
    return this.writes.save({
      version: this.filledVersion(),
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changeMaker, { params: { id: maker.id }, body: { ...body, active, version } }),
    });
  }

  /** Fills the form once; what somebody else saves later does not overwrite what is being typed here. */
  private fill(maker: MakerView): void {
    if (this.filledVersion() === maker.version || this.form.dirty) {
      return;
    }
    const filled = makerForm(maker, this.monday);
    this.form.setControl('crafts', filled.controls.crafts);
    this.form.setControl('patterns', filled.controls.patterns);
    const { crafts: _crafts, patterns: _patterns, ...rest } = filled.getRawValue();
    this.form.patchValue(rest);
    this.filledVersion.set(maker.version);
  }
}
