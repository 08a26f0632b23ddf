import { ChangeDetectionStrategy, Component, effect, inject, signal, untracked } from '@angular/core';
import { FormControl, FormGroup, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { endpoints, ForecastSettings, type StudioView } from '@common/contract';
import { Api, onLiveEvent, readEndpoint } from '../api';
import { SessionStore } from '../session';
import { ChoiceField } from '../ui/choice-field';
import { VersionedWrites } from '../ui/conflict-dialog';
import { keeps } from '../ui/field-errors';
import { FigureField } from '../ui/figure-field';
import { FormSave } from '../ui/form-save';
import { Notice } from '../ui/notice';
import { PER_CENT, WHOLE } from '../ui/reads-text';
import { StatePanel } from '../ui/state-panel';
import { HoursPipe } from '../ui/time-pipes';
import { Toasts } from '../ui/toasts';

type Figure = Exclude<keyof ForecastSettings, 'learning'>;

const figure = (name: Figure): FormControl<number | null> =>
  new FormControl<number | null>(null, [Validators.required, keeps(ForecastSettings.shape[name])]);

/** How the forecast draws what nobody gave three points for, and what the studio's finished work has taught it. */
@Component({
  selector: 'fettle-forecast-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FigureField, HoursPipe, MatButton, Notice, StatePanel],
  templateUrl: './forecast-board.html',
  styles: `
    form {
      gap: var(--space-3);
    }
    table {
      width: 100%;
      border-collapse: collapse;
    }
    th,
    td {
      padding: var(--space-1) var(--space-2) var(--space-1) 0;
      border-bottom: 1px solid var(--rule);
      text-align: start;
    }
  `,
})
export class ForecastBoard {
  private readonly api = inject(Api);
  private readonly session = inject(SessionStore);
  private readonly toasts = inject(Toasts);
  private readonly writes = inject(VersionedWrites);

  protected readonly studio = readEndpoint(endpoints.readStudio);
  protected readonly past = readEndpoint(endpoints.readPastHours);
  protected readonly isOwner = this.session.role() === 'owner';
  protected readonly readers = { whole: WHOLE, percent: PER_CENT };
  protected readonly save = new FormSave();
  private readonly filledVersion = signal(0);

  protected readonly learnings = [
    { value: 'past-hours', label: 'Learn from finished work' },
    { value: 'estimates', label: 'Believe the estimates' },
  ] as const;
  protected readonly fields = [
    { name: 'dwellLowPermille', label: 'Shortest dwell', hint: 'Of one without a material.' },
    { name: 'dwellHighPermille', label: 'Longest dwell', hint: '' },
    { name: 'replyLowPermille', label: 'Soonest answer', hint: 'Of a client, by message.' },
    { name: 'replyHighPermille', label: 'Latest answer', hint: '' },
    { name: 'deliveryLatePermille', label: 'Latest delivery', hint: 'Late by so much of its lead time.' },
    { name: 'absencePermille', label: 'A maker is away', hint: 'On a day that they should be there.' },
    { name: 'climateSpreadPermille', label: 'A warm or cold week', hint: 'Moves all dwells at once.' },
  ] as const;
  protected readonly form = new FormGroup({
    draws: figure('draws'),
    learning: new FormControl<ForecastSettings['learning']>('past-hours', { nonNullable: true }),
    dwellLowPermille: figure('dwellLowPermille'),
    dwellHighPermille: figure('dwellHighPermille'),
    replyLowPermille: figure('replyLowPermille'),
    replyHighPermille: figure('replyHighPermille'),
    deliveryLatePermille: figure('deliveryLatePermille'),
    absencePermille: figure('absencePermille'),
    climateSpreadPermille: figure('climateSpreadPermille'),
  });

  constructor() {
    onLiveEvent((event) => {
      // The other board on this page, or somebody else.
      if (event?.kind === 'record-changed' && event.subject === 'studio') this.studio.reload();
    });
    if (!this.isOwner) this.form.disable();
    effect(() => {
      const studio = this.studio.value();
      if (studio && !untracked(() => this.form.dirty)) {
        this.form.patchValue(studio.forecast);
        this.filledVersion.set(studio.version);
      }
    });
  }

  protected async submit(event: Event): Promise<void> {
    event.preventDefault();
    const saved = await this.save.run(this.form, () => this.send());
    if (saved === undefined) return;
    this.form.markAsPristine();
    if (saved === null) {
      this.studio.reload();
      return;
    }
    this.studio.set(saved);
    this.toasts.say('The forecast’s settings are saved.');
  }

  private send(): Promise<StudioView | null> {
    const given = Object.entries(this.form.getRawValue()).filter(([, value]) => value !== null);
    const forecast = Object.fromEntries(given) as Partial<ForecastSettings>;
    return this.writes.save({
      version: this.filledVersion(),
      labels: { forecast: 'Forecast' },
      send: (version) => this.api.callEndpoint(endpoints.changeStudio, { body: { forecast, version } }),
    });
  }
}
