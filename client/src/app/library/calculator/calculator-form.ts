import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { MaterialView } from '@common/contract';
import { isLocalTime } from '@common/time/local-time';
import { must } from '../../ui/field-errors';

/** The choice of one steady temperature, and of the whole studio, among the ids of bays. */
export const STEADY = 'steady';
export const STUDIO = 'studio';

type Milestone = MaterialView['dwells'][number]['milestone'];

const isDay = (day: string): boolean => day === '' || /^\d{4}-\d{2}-\d{2}$/.test(day);
const day = (value: string, ...more: ReturnType<typeof must>[]) =>
  new FormControl(value, { nonNullable: true, validators: [...more, must(isDay, 'Write a day such as 14/04/2026.')] });
const time = (value: string) =>
  new FormControl(value, { nonNullable: true, validators: must(isLocalTime, 'Write a time such as 17:00.') });
const figure = (value: number, least: number, most: number) =>
  new FormControl<number | null>(value, [Validators.required, Validators.min(least), Validators.max(most)]);

/** What the calculator is asked. The steady figures are off while a place is chosen. */
export function calculatorForm(start: { readonly day: string; readonly time: string }) {
  const form = new FormGroup({
    materialId: new FormControl<string | null>(null, Validators.required),
    milestone: new FormControl<Milestone | null>(null, Validators.required),
    place: new FormControl(STUDIO, { nonNullable: true }),
    celsius: figure(20, -30, 250),
    humidityPercent: figure(50, 0, 100),
    startDay: day(start.day, Validators.required),
    startTime: time(start.time),
    readyDay: day(''),
    readyTime: time('17:00'),
  });
  form.controls.celsius.disable();
  form.controls.humidityPercent.disable();
  return form;
}
