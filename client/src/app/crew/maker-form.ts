import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import { type MakerCraft, type MakerView, Name, Note } from '@common/contract';
import type { z } from 'zod';
import { keeps, must } from '../ui/field-errors';
import { patternOf, patternRow, usualPattern } from '../ui/patterns';

type Craft = z.infer<typeof MakerCraft>;

/** One row: a craft and the maker's pace in it, per mille. */
export function craftRow(craft: Craft) {
  return new FormGroup({
    craftId: new FormControl(craft.craftId, { nonNullable: true, validators: Validators.required }),
    pacePermille: new FormControl<number | null>(craft.pacePermille, [
      Validators.required,
      must((pace: number | null) => pace === null || (pace >= 100 && pace <= 3000), 'A pace is from 0.1 to 3.'),
    ]),
  });
}

/** The form of a maker; of a new one, with the usual week from `monday` on. */
export function makerForm(maker: MakerView | null, monday: string) {
  return new FormGroup({
    name: new FormControl(maker?.name ?? '', { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    initials: new FormControl(maker?.initials ?? '', {
      nonNullable: true,
      validators: [
        Validators.required,
        must((text: string) => /^\p{L}{1,3}$/u.test(text.trim()), 'Initials are one to three letters.'),
      ],
    }),
    crafts: new FormArray((maker?.crafts ?? []).map(craftRow)),
    patterns: new FormArray((maker?.patterns ?? [usualPattern(monday)]).map(patternRow)),
    hourCostMinor: new FormControl<number | null>(maker?.hourCostMinor ?? null, Validators.required),
    dayLimitMinutes: new FormControl<number | null>(maker?.dayLimitMinutes ?? null),
    weekLimitMinutes: new FormControl<number | null>(maker?.weekLimitMinutes ?? null),
    active: new FormControl(maker?.active ?? true, { nonNullable: true }),
    note: new FormControl(maker?.note ?? '', { nonNullable: true, validators: keeps(Note) }),
  });
}

/** The form of a maker. */
export type MakerForm = ReturnType<typeof makerForm>;

/** What the form says of the maker; the form is to be valid. */
export function makerBodyOf(form: MakerForm) {
  const raw = form.getRawValue();
  return {
    name: raw.name.trim(),
    initials: raw.initials.trim(),
    crafts: raw.crafts.map(({ craftId, pacePermille }) => ({ craftId, pacePermille: pacePermille ?? 1000 })),
    patterns: form.controls.patterns.controls.map(patternOf),
    hourCostMinor: raw.hourCostMinor ?? 0,
    dayLimitMinutes: raw.dayLimitMinutes,
    weekLimitMinutes: raw.weekLimitMinutes,
    active: raw.active,
    note: raw.note,
  };
}
