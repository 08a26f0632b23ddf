import { ChangeDetectionStrategy, Component, effect, inject, signal, untracked } from '@angular/core';
import { FormControl, FormGroup, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { endpoints, Name, type StudioView, ZoneName } from '@common/contract';
import { Api, onLiveEvent, readEndpoint } from '../api';
import { SessionStore } from '../session';
import { VersionedWrites } from '../ui/conflict-dialog';
import { keeps } from '../ui/field-errors';
import { FigureField } from '../ui/figure-field';
import { FormSave } from '../ui/form-save';
import { Notice } from '../ui/notice';
import { STUDIO_CURRENCY } from '../ui/money';
import { CLOCK_TIME, DECIMAL, FACTOR, HOURS, moneyIn } from '../ui/reads-text';
import { StatePanel } from '../ui/state-panel';
import { TextField } from '../ui/text-field';
import { Toasts } from '../ui/toasts';

const figure = (...rules: ReturnType<typeof Validators.min>[]): FormControl<number | null> =>
  new FormControl<number | null>(null, [Validators.required, ...rules]);

/** The studio's name and zone, its room, people's limits, and what a plan seeks. Only an owner changes it. */
@Component({
  selector: 'fettle-studio-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FigureField, MatButton, Notice, StatePanel, TextField],
  templateUrl: './studio-board.html',
  styles: `
    form {
      gap: var(--space-4);
    }
  `,
})
export class StudioBoard {
  private readonly api = inject(Api);
  private readonly session = inject(SessionStore);
  private readonly toasts = inject(Toasts);
  private readonly writes = inject(VersionedWrites);

  protected readonly studio = readEndpoint(endpoints.readStudio);
  protected readonly isOwner = this.session.role() === 'owner';
  protected readonly currency = inject(STUDIO_CURRENCY)();
  protected readonly readers = {
    hours: HOURS,
    clock: CLOCK_TIME,
    decimal: DECIMAL,
    factor: FACTOR,
    money: moneyIn(this.currency),
  };
  protected readonly save = new FormSave();
  private readonly filledVersion = signal(0);

  protected readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    zone: new FormControl('', { nonNullable: true, validators: [Validators.required, keeps(ZoneName)] }),
    settings: new FormGroup({
      roomTemperatureCelsius: figure(Validators.min(-20), Validators.max(60)),
      roomHumidityPercent: figure(Validators.min(0), Validators.max(100)),
      dayLimitMinutes: figure(),
      weekLimitMinutes: figure(),
      restBetweenMinutes: figure(),
      overtimePermille: figure(Validators.min(1000), Validators.max(5000)),
      freezeMinutes: figure(),
      changePenaltyMinor: figure(Validators.min(0)),
      unevennessWeight: figure(Validators.min(0), Validators.max(1000)),
      earlinessWeight: figure(Validators.min(0), Validators.max(1000)),
    }),
  });

  constructor() {
    onLiveEvent((event) => {
      // The other board on this page, or somebody else.
      if (event?.kind === 'record-changed' && event.subject === 'studio') this.studio.reload();
    });
    if (!this.isOwner) {
      this.form.disable();
    }
    effect(() => {
      const studio = this.studio.value();
      if (studio && !untracked(() => this.form.dirty)) {
        this.form.patchValue(studio);
        this.filledVersion.set(studio.version);
      }
    });
  }

  protected async submit(event: Event): Promise<void> {
    event.preventDefault();
    const saved = await this.save.run(this.form, () => this.send());
    if (saved === undefined) {
      return;
    }
    this.form.markAsPristine();
    if (saved === null) {
      this.studio.reload();
      return;
    }
    this.studio.set(saved);
    this.toasts.say('The settings are saved.');
    // The name stands in the header and the zone tells every time.
    await this.session.refresh();
  }

  private send(): Promise<StudioView | null> {
    const { settings, ...words } = this.form.getRawValue();
    const given = Object.fromEntries(Object.entries(settings).filter(([, value]) => value !== null));
    return this.writes.save({
      version: this.filledVersion(),
      labels: { name: 'Name', zone: 'Time zone', settings: 'Limits and weights' },
      send: (version) =>
        this.api.callEndpoint(endpoints.changeStudio, { body: { ...words, settings: given, version } }),
    });
  }
}
