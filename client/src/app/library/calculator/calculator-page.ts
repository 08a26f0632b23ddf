import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { endpoints } from '@common/contract';
import { MILESTONE_NAMES } from '@common/domain/material';
import { CAUTION_NOTICE } from '@common/domain/safety';
import { constantClimate } from '@common/dwell/climate';
import { formatDayAndTime } from '@common/time/format-instant';
import { readEndpoint, reloadOnChange } from '../../api';
import { ChoiceField } from '../../ui/choice-field';
import { FigureField } from '../../ui/figure-field';
import { Notice } from '../../ui/notice';
import { PageHeading } from '../../ui/page-heading';
import { Plot } from '../../ui/plot/plot';
import { DECIMAL } from '../../ui/reads-text';
import { fromDayAndTime, instantOf, minuteOf, toDayAndTime } from '../../ui/say-time';
import { StatePanel } from '../../ui/state-panel';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { TextField } from '../../ui/text-field';
import { ClockTimePipe } from '../../ui/time-pipes';
import { sayLaw, sayLimits, sayMilestone } from '../words';
import { cureCourse, type DwellQuestion, historyOf, latestByLength, leavesTheWeek, LENGTHS } from './calculate-dwell';
import { readyByLength, sayHindrances, sayTemperatureLimits, temperatureByLength } from './calculate-dwell';
import { calculatorForm, STEADY, STUDIO } from './calculator-form';
import { drawCure } from './draw-cure';

const MS_PER_MINUTE = 60_000;
const LENGTH_WORDS = { low: 'Short', likely: 'Usual', high: 'Long' } as const;

/** Reckons with a material of the library: when it is ready, how late it may start, how warm it has to be. Saves nothing. */
@Component({
  selector: 'fettle-calculator-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, ClockTimePipe, FigureField, Notice, PageHeading, Plot, RouterLink, StatePanel, TextField],
  templateUrl: './calculator-page.html',
  styleUrl: './calculator-page.scss',
})
export class CalculatorPage {
  private readonly clock = inject(STUDIO_CLOCK);

  protected readonly materials = readEndpoint(endpoints.listMaterials);
  protected readonly climates = readEndpoint(endpoints.listClimates);
  protected readonly notice = CAUTION_NOTICE;
  protected readonly decimal = DECIMAL;
  protected readonly steady = STEADY;
  protected readonly sayLaw = sayLaw;
  protected readonly sayLimits = sayLimits;
  protected readonly form = calculatorForm(
    toDayAndTime(instantOf(Math.floor(this.clock.now() / MS_PER_MINUTE)), this.clock.zone()),
  );
  /** The status goes with it: a field that becomes unreadable may keep its value, null. */
  private readonly written = toSignal(this.form.events);

  protected readonly materialChoices = computed(() =>
    (this.materials.value() ?? [])
      .filter((one) => one.dwells.length > 0)
      .map(({ id, name }) => ({ value: id, label: name }))
      .toSorted((a, b) => a.label.localeCompare(b.label)),
  );
  protected readonly placeChoices = computed(() => [
    ...(this.climates.value() ?? [])
      .filter((place) => historyOf(place) !== null)
      .map(({ bayId, name }) => ({ value: bayId ?? STUDIO, label: name })),
    { value: STEADY, label: 'One steady temperature' },
  ]);
  protected readonly material = computed(() => {
    this.written();
    return this.materials.value()?.find((one) => one.id === this.form.controls.materialId.value) ?? null;
  });
  protected readonly milestoneChoices = computed(() =>
    (this.material()?.dwells ?? []).map(({ milestone }) => ({ value: milestone, label: sayMilestone(milestone) })),
  );

  private readonly question = computed<DwellQuestion | null>(() => {
    this.written();
    const { milestone, startDay, startTime, readyDay, readyTime } = this.form.getRawValue();
    const material = this.material();
    const dwell = material?.dwells.find((one) => one.milestone === milestone);
    const history = this.history();
    const zone = this.clock.zone();
    const start = fromDayAndTime(startDay, startTime, zone);
    if (!this.form.valid || !material || !dwell || !history || start === null) return null;
    const by = fromDayAndTime(readyDay, readyTime, zone);
    return { material, dwell, history, start: minuteOf(start), readyBy: by === null ? null : minuteOf(by) };
  });

  /** Everything that is answered, in words; null until all is given. */
  protected readonly answers = computed(() => {
    const question = this.question();
    if (question === null) return null;
    const ready = readyByLength(question);
    const latest = latestByLength(question);
    const celsius = temperatureByLength(question);
    const course = cureCourse(question);
    const say = (at: number | null, never: string): string =>
      at === null ? never : formatDayAndTime(at, this.clock.zone());
    return {
      dwell: question.dwell,
      milestone: MILESTONE_NAMES[question.dwell.milestone],
      asksBy: question.readyBy !== null,
      rows: LENGTHS.map((length) => ({
        length: LENGTH_WORDS[length],
        minutes: question.dwell.minutes[length],
        ready: say(ready[length], 'never'),
        latest: say(latest[length], 'no start does'),
        isPast: (latest[length] ?? Infinity) < this.clock.now() / MS_PER_MINUTE,
        celsius: celsius[length] === null ? 'none known' : `${celsius[length]} °C`,
      })),
      hindrances: sayHindrances(question),
      limits: sayTemperatureLimits(question),
      leavesTheWeek: leavesTheWeek(question.history, [
        question.start,
        ...Object.values(ready),
        ...Object.values(latest),
      ]),
      course: course.map((point) => ({ ...point, when: say(point.at, '') })),
      draw: drawCure(course, this.clock.zone()),
    };
  });

  constructor() {
    reloadOnChange(this.materials, 'material');
    effect(() => {
      const first = this.materialChoices().at(0);
      if (first && untracked(() => this.form.controls.materialId.value) === null) {
        this.form.controls.materialId.setValue(first.value);
        this.chooseMilestone();
      }
    });
  }

  /** Another material has other milestones: the one chosen stays where it has it too. */
  protected chooseMilestone(): void {
    const { materialId, milestone } = this.form.controls;
    const dwells = this.materials.value()?.find((one) => one.id === materialId.value)?.dwells ?? [];
    if (!dwells.some((one) => one.milestone === milestone.value)) milestone.setValue(dwells.at(0)?.milestone ?? null);
  }

  protected choosePlace(): void {
    const { place, celsius, humidityPercent } = this.form.controls;
    for (const control of [celsius, humidityPercent]) {
      if (place.value === STEADY) control.enable();
      else control.disable();
    }
  }

  private history() {
    const { place, celsius, humidityPercent } = this.form.getRawValue();
    if (place === STEADY) {
      return celsius === null || humidityPercent === null ? null : constantClimate({ celsius, humidityPercent });
    }
    return historyOf((this.climates.value() ?? []).find(({ bayId }) => (bayId ?? STUDIO) === place));
  }
}
