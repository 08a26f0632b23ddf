import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { MaterialView } from '@common/contract';
import { MATERIAL_MILESTONES, MILESTONE_NAMES } from '@common/domain/material';
import { SENTENCE } from '../ui/field-errors';

type Dwell = MaterialView['dwells'][number];
type LawKind = Dwell['law']['kind'];

/** What a dwell may wait for, in the order in which a material gets there. */
export const MILESTONE_CHOICES = MATERIAL_MILESTONES.map((value) => ({ value, label: MILESTONE_NAMES[value] }));

/** What figure a law needs, and where it starts; null for a law without one. */
export const LAW_FIGURES: Readonly<Record<LawKind, { readonly label: string; readonly usual: number } | null>> = {
  none: null,
  'factor-per-10-degrees': { label: 'Times as fast', usual: 2 },
  arrhenius: { label: 'Activation energy, J/mol', usual: 50_000 },
  'nurse-saul': { label: 'Counted from, °C', usual: -10 },
  evaporation: null,
};

/** The form of one dwell of a material. */
export function dwellRow(dwell: Dwell) {
  const time = (value: number): FormControl<number | null> =>
    new FormControl<number | null>(value, Validators.required);
  return new FormGroup(
    {
      milestone: new FormControl(dwell.milestone, { nonNullable: true }),
      low: time(dwell.minutes.low),
      likely: time(dwell.minutes.likely),
      high: time(dwell.minutes.high),
      law: new FormControl<LawKind>(dwell.law.kind, { nonNullable: true }),
      lawFigure: new FormControl<number | null>(figureOf(dwell.law)),
      minimumCelsius: new FormControl<number | null>(dwell.minimumCelsius),
      maximumCelsius: new FormControl<number | null>(dwell.maximumCelsius),
      source: new FormControl(dwell.source, { nonNullable: true, validators: Validators.maxLength(400) }),
    },
    {
      validators: (row) => {
        const { low, likely, high } = row.value as { low: number | null; likely: number | null; high: number | null };
        const inOrder = (low ?? 0) <= (likely ?? 0) && (likely ?? 0) <= (high ?? 0);
        return inOrder ? null : { [SENTENCE]: 'Short, usual and long must stand in that order.' };
      },
    },
  );
}

/** The form of one dwell of a material. */
export type DwellRow = ReturnType<typeof dwellRow>;

/** The dwell that a row says. */
export function dwellOf(row: DwellRow): Dwell {
  const raw = row.getRawValue();
  return {
    milestone: raw.milestone,
    minutes: { low: raw.low ?? 0, likely: raw.likely ?? 0, high: raw.high ?? 0 },
    law: lawOf(raw.law, raw.lawFigure ?? LAW_FIGURES[raw.law]?.usual ?? 0),
    minimumCelsius: raw.minimumCelsius,
    maximumCelsius: raw.maximumCelsius,
    source: raw.source.trim(),
  };
}

function figureOf(law: Dwell['law']): number | null {
  switch (law.kind) {
    case 'factor-per-10-degrees':
      return law.factor;
    case 'arrhenius':
      return law.activationEnergyJPerMol;
    case 'nurse-saul':
      return law.datumCelsius;
    case 'none':
    case 'evaporation':
      return null;
  }
}

function lawOf(kind: LawKind, figure: number): Dwell['law'] {
  switch (kind) {
    case 'factor-per-10-degrees':
      return { kind, factor: figure };
    case 'arrhenius':
      return { kind, activationEnergyJPerMol: figure };
    case 'nurse-saul':
      return { kind, datumCelsius: figure };
    case 'none':
    case 'evaporation':
      return { kind };
  }
}
