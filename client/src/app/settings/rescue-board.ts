import { ChangeDetectionStrategy, Component, effect, inject, signal, untracked } from '@angular/core';
import { FormControl, FormGroup, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { endpoints, type RescueSettings, type StudioView } from '@common/contract';
import { MEASURE_KINDS, type MeasureKind } from '@common/domain/measure-kind';
import { Api, onLiveEvent, readEndpoint } from '../api';
import { SessionStore } from '../session';
import { choicesOf } from '../ui/choice-field';
import { ChoicesField } from '../ui/choices-field';
import { VersionedWrites } from '../ui/conflict-dialog';
import { FigureField } from '../ui/figure-field';
import { FormSave } from '../ui/form-save';
import { STUDIO_CURRENCY } from '../ui/money';
import { Notice } from '../ui/notice';
import { DECIMAL, type FigureReader, HOURS, moneyIn, PER_CENT, WHOLE } from '../ui/reads-text';
import { StatePanel } from '../ui/state-panel';
import { Toasts } from '../ui/toasts';

const KIND_NAMES: Readonly<Record<MeasureKind, string>> = {
  overtime: 'Overtime in the evening',
  'weekend-shift': 'A shift at the weekend',
  freelancer: 'A freelancer',
  heat: 'Heating a bay',
  'second-mould': 'A second mould',
  'faster-material': 'A faster material',
  'earlier-sign-off': 'An earlier sign-off',
  'part-delivery': 'A part delivery',
  'later-date': 'A later date',
};

type Figure = Exclude<keyof RescueSettings, 'allowed'>;

const figure = (least: number, most: number): FormControl<number | null> =>
  new FormControl<number | null>(null, [Validators.required, Validators.min(least), Validators.max(most)]);
const MOST_MONEY = 1_000_000_000;

/** What may be proposed for a date at risk, how much of it, and at which prices. */
@Component({
  selector: 'fettle-rescue-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoicesField, FigureField, MatButton, Notice, StatePanel],
  template: `
    <fettle-state-panel [read]="studio">
      @if (studio.value()) {
        <form class="board stack" novalidate aria-labelledby="rescue-heading" (submit)="submit($event)">
          <h2 id="rescue-heading">Rescues</h2>
          <p class="small quiet">
            What the studio would do for a date at risk, and what it costs. Nothing is done by being allowed here; each
            is taken by hand on Dates. People’s hours stay within their own agreement and the law.
          </p>
          <fettle-choices-field label="May be proposed" [control]="form.controls.allowed" [choices]="kinds" />
          <div class="fields">
            @for (field of fields; track field.name) {
              <fettle-figure-field
                [label]="field.label"
                [unit]="field.unit"
                [reader]="field.reader"
                [control]="form.controls[field.name]"
              />
            }
          </div>
          @for (sentence of save.messages(); track sentence) {
            <fettle-notice tone="fault" [text]="sentence" />
          }
          @if (isOwner) {
            <div>
              <button matButton="filled" type="submit" [disabled]="save.busy()">
                {{ save.busy() ? 'Saving…' : 'Save' }}
              </button>
            </div>
          }
        </form>
      }
    </fettle-state-panel>
  `,
  styles: `
    form {
      gap: var(--space-3);
    }
  `,
})
export class RescueBoard {
  private readonly api = inject(Api);
  private readonly toasts = inject(Toasts);
  private readonly writes = inject(VersionedWrites);
  private readonly currency = inject(STUDIO_CURRENCY)();

  protected readonly studio = readEndpoint(endpoints.readStudio);
  protected readonly isOwner = inject(SessionStore).role() === 'owner';
  protected readonly save = new FormSave();
  protected readonly kinds = choicesOf(KIND_NAMES);
  private readonly filledVersion = signal(0);

  protected readonly fields = this.describeFields();
  protected readonly form = new FormGroup({
    allowed: new FormControl<MeasureKind[]>([...MEASURE_KINDS], { nonNullable: true }),
    eveningMinutes: figure(15, 360),
    eveningDays: figure(1, 60),
    weekendMinutes: figure(60, 600),
    freelancerDayMinor: figure(0, MOST_MONEY),
    freelancerDays: figure(1, 60),
    heatCelsius: figure(10, 60),
    heatHourMinor: figure(0, MOST_MONEY),
    mouldMinor: figure(0, MOST_MONEY),
    materialMinor: figure(0, MOST_MONEY),
    signOffMinor: figure(0, MOST_MONEY),
    partDeliveryMinor: figure(0, MOST_MONEY),
    laterDayMinor: figure(0, MOST_MONEY),
    laterDays: figure(1, 120),
    goalPermille: figure(1, 900),
  });

  constructor() {
    onLiveEvent((event) => {
      if (event?.kind === 'record-changed' && event.subject === 'studio') this.studio.reload();
    });
    if (!this.isOwner) this.form.disable();
    effect(() => {
      const studio = this.studio.value();
      if (studio && !untracked(() => this.form.dirty)) {
        this.form.patchValue(studio.rescue);
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
    this.toasts.say('What may be done for a date is saved.');
  }

  private send(): Promise<StudioView | null> {
    const given = Object.entries(this.form.getRawValue()).filter(([, value]) => value !== null);
    const rescue = Object.fromEntries(given) as Partial<RescueSettings>;
    return this.writes.save({
      version: this.filledVersion(),
      labels: { rescue: 'Rescues' },
      send: (version) => this.api.callEndpoint(endpoints.changeStudio, { body: { rescue, version } }),
    });
  }

  private describeFields(): readonly {
    readonly name: Figure;
    readonly label: string;
    readonly unit: string;
    readonly reader: FigureReader;
  }[] {
    const money = moneyIn(this.currency);
    const { currency } = this;
    return [
      { name: 'goalPermille', label: 'Saved from this chance on', unit: '%', reader: PER_CENT },
      { name: 'eveningMinutes', label: 'Overtime an evening', unit: 'h', reader: HOURS },
      { name: 'eveningDays', label: 'Evenings for', unit: 'days', reader: WHOLE },
      { name: 'weekendMinutes', label: 'A weekend shift', unit: 'h', reader: HOURS },
      { name: 'freelancerDayMinor', label: 'A freelancer’s day', unit: currency, reader: money },
      { name: 'freelancerDays', label: 'A freelancer comes for', unit: 'days', reader: WHOLE },
      { name: 'heatCelsius', label: 'Heat a bay to', unit: '°C', reader: DECIMAL },
      { name: 'heatHourMinor', label: 'An hour of heating', unit: currency, reader: money },
      { name: 'mouldMinor', label: 'A second mould', unit: currency, reader: money },
      { name: 'materialMinor', label: 'A faster material, a stage', unit: currency, reader: money },
      { name: 'signOffMinor', label: 'Hurrying a sign-off', unit: currency, reader: money },
      { name: 'partDeliveryMinor', label: 'A part delivery', unit: currency, reader: money },
      { name: 'laterDayMinor', label: 'A day’s delay', unit: currency, reader: money },
      { name: 'laterDays', label: 'Latest to ask for', unit: 'days', reader: WHOLE },
    ];
  }
}
