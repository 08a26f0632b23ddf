import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { FormControl, FormGroup, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { type ClimateProfile, type ClimateView, endpoints } from '@common/contract';
import type { Weekday } from '@common/domain/weekday';
import { formatDayAndTime } from '@common/time/format-instant';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../api';
import { SessionStore } from '../../session';
import { choicesOf } from '../../ui/choice-field';
import { ChoicesField } from '../../ui/choices-field';
import { VersionedWrites } from '../../ui/conflict-dialog';
import { FigureField } from '../../ui/figure-field';
import { FormSave } from '../../ui/form-save';
import { Notice } from '../../ui/notice';
import { Plot } from '../../ui/plot/plot';
import { DECIMAL, HOURS } from '../../ui/reads-text';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { ClimateLogDialog } from './climate-log-dialog';
import { climateWarnings } from './climate-words';
import { drawWeek } from './draw-week';

const DAY_NAMES: Readonly<Record<Weekday, string>> = {
  MO: 'Monday',
  TU: 'Tuesday',
  WE: 'Wednesday',
  TH: 'Thursday',
  FR: 'Friday',
  SA: 'Saturday',
  SU: 'Sunday',
};
/** What the form begins with where nothing was said: a workshop in the temperate north. Common practice, no source. */
const USUAL = {
  winterCelsius: 6,
  summerCelsius: 21,
  winterHumidityPercent: 80,
  summerHumidityPercent: 60,
  days: ['MO', 'TU', 'WE', 'TH', 'FR'] as Weekday[],
  heatedCelsius: 18,
  fromMinuteOfDay: 450,
  untilMinuteOfDay: 1080,
  setBackCelsius: 10,
};

const figure = (
  least: number,
  most: number,
  ...rules: ReturnType<typeof Validators.min>[]
): FormControl<number | null> =>
  new FormControl<number | null>(null, [Validators.min(least), Validators.max(most), ...rules]);

/** Temperature and humidity of one place: what they are reckoned as, the coming week, and changing them. */
@Component({
  selector: 'fettle-climate-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoicesField, FigureField, MatButton, Notice, Plot],
  templateUrl: './climate-board.html',
})
export class ClimateBoard {
  private readonly api = inject(Api);
  private readonly clock = inject(STUDIO_CLOCK);
  private readonly dialog = inject(MatDialog);
  private readonly writes = inject(VersionedWrites);

  readonly place = input.required<ClimateView>();
  readonly changed = output();

  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly editing = signal(false);
  protected readonly saving = new FormSave();
  protected readonly decimal = DECIMAL;
  protected readonly hours = HOURS;
  protected readonly days = choicesOf(DAY_NAMES);
  protected readonly form = new FormGroup({
    winterCelsius: figure(-30, 250, Validators.required),
    summerCelsius: figure(-30, 250, Validators.required),
    winterHumidityPercent: figure(0, 100, Validators.required),
    summerHumidityPercent: figure(0, 100, Validators.required),
    days: new FormControl<Weekday[]>([], { nonNullable: true }),
    heatedCelsius: figure(-30, 250),
    fromMinuteOfDay: figure(0, 1440),
    untilMinuteOfDay: figure(0, 1440),
    setBackCelsius: figure(-30, 250),
  });

  protected readonly draw = computed(() => drawWeek(this.place().week, this.clock.zone()));
  protected readonly steps = computed(() =>
    this.place().week.map((step) => ({ ...step, when: formatDayAndTime(step.from, this.clock.zone()) })),
  );
  protected readonly warnings = computed(() => climateWarnings(this.place().week));
  protected readonly basis = computed(() => {
    const { bayId, profile, readings, week } = this.place();
    const measured = readings ? ` ${readings.count} readings of a logger stand over it.` : '';
    if (profile) return `By the season and its heating.${measured}`;
    if (bayId !== null && week.length !== 1) return `As in the studio.${measured}`;
    const [only] = week;
    return `One temperature all year: ${only?.celsius ?? '?'} °C, ${only?.humidityPercent ?? '?'} %.${measured}`;
  });

  protected toggle(): void {
    const { profile } = this.place();
    if (!this.editing()) this.form.reset(profile ? formOf(profile) : USUAL);
    this.editing.update((open) => !open);
  }

  protected save(event: Event): Promise<void> {
    event.preventDefault();
    return this.send(() => profileOf(this.form.getRawValue()));
  }

  protected letGo(): Promise<void> {
    return this.send(() => null);
  }

  protected async openLog(): Promise<void> {
    const data = { bayId: this.place().bayId, name: this.place().name };
    const dialog = this.dialog.open<ClimateLogDialog, typeof data, boolean>(ClimateLogDialog, {
      data,
      width: '40rem',
      maxWidth: '96vw',
    });
    if (await firstValueFrom(dialog.afterClosed())) this.changed.emit();
  }

  private async send(profile: () => ClimateProfile | null): Promise<void> {
    const { bayId, version } = this.place();
    const saved = await this.saving.run(this.form, () =>
      this.writes.save({
        version,
        labels: { profile: 'Climate' },
        send: (seen) =>
          this.api.callEndpoint(endpoints.changeClimate, { body: { bayId, profile: profile(), version: seen } }),
      }),
    );
    if (saved === undefined) return;
    this.editing.set(false);
    this.changed.emit();
  }
}

/** What the form holds. */
interface Filled extends Omit<
  ClimateProfile,
  'heating' | 'winterCelsius' | 'summerCelsius' | 'winterHumidityPercent' | 'summerHumidityPercent'
> {
  readonly winterCelsius: number | null;
  readonly summerCelsius: number | null;
  readonly winterHumidityPercent: number | null;
  readonly summerHumidityPercent: number | null;
  readonly days: Weekday[];
  readonly heatedCelsius: number | null;
  readonly fromMinuteOfDay: number | null;
  readonly untilMinuteOfDay: number | null;
}

function formOf(profile: ClimateProfile): Filled {
  const { heating, ...rest } = profile;
  return {
    ...rest,
    days: [...(heating?.days ?? [])],
    heatedCelsius: heating?.celsius ?? USUAL.heatedCelsius,
    fromMinuteOfDay: heating?.fromMinuteOfDay ?? USUAL.fromMinuteOfDay,
    untilMinuteOfDay: heating?.untilMinuteOfDay ?? USUAL.untilMinuteOfDay,
  };
}

function profileOf({ days, heatedCelsius, fromMinuteOfDay, untilMinuteOfDay, ...rest }: Filled): ClimateProfile {
  const heating =
    days.length === 0
      ? null
      : {
          days,
          celsius: heatedCelsius ?? USUAL.heatedCelsius,
          fromMinuteOfDay: fromMinuteOfDay ?? 0,
          untilMinuteOfDay: untilMinuteOfDay ?? 1440,
        };
  const { winterCelsius, summerCelsius, winterHumidityPercent, summerHumidityPercent, setBackCelsius } = rest;
  return {
    // The form is not sent with any of these empty.
    winterCelsius: winterCelsius ?? 0,
    summerCelsius: summerCelsius ?? 0,
    winterHumidityPercent: winterHumidityPercent ?? 0,
    summerHumidityPercent: summerHumidityPercent ?? 0,
    setBackCelsius,
    heating,
  };
}
