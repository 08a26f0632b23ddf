import type { MaterialDraft, MaterialDwell, MaterialMilestone } from '@common/domain/material';
import { cautionsForFamily, type MaterialFamily } from '@common/domain/safety';
import type { DwellLaw } from '@common/dwell/law';

/** A material of the library with the key that recipes name it by. */
export interface DemoMaterial extends MaterialDraft {
  readonly id: string;
}

/** Where no published figure was found: what workshops reckon with. Overwrite it from the sheet of the product in use. */
export const USUAL_PRACTICE = 'Usual practice, no source';

/** A time that the room does not move. */
export const NO_LAW: DwellLaw = { kind: 'none' };
/** Drying by the air’s warmth and dryness. */
export const BY_AIR: DwellLaw = { kind: 'evaporation' };

/** Ten degrees more divide the time by `factor`. */
export function perTenDegrees(factor: number): DwellLaw {
  return { kind: 'factor-per-10-degrees', factor };
}

/** Arrhenius with an activation energy in kJ/mol. */
export function arrhenius(kilojoulesPerMol: number): DwellLaw {
  return { kind: 'arrhenius', activationEnergyJPerMol: kilojoulesPerMol * 1000 };
}

/** Low, likely and high hours to a milestone, its law, and where the figures come from. */
export type Figure = readonly [MaterialMilestone, readonly [number, number, number], DwellLaw, string];

/** The temperatures between which a material's figures hold, in degrees Celsius; null where none is known. */
export interface Band {
  readonly minimum: number | null;
  readonly maximum: number | null;
}

/** What a material is, before its figures. */
export interface MaterialKind {
  readonly name: string;
  readonly family: MaterialFamily;
  readonly band: Band;
  /** Minutes that somebody stays by a fresh batch. */
  readonly attended?: number;
  readonly note?: string;
}

/** Builds a material from figures in hours at 20 °C and 50 % humidity. */
export function material(key: string, kind: MaterialKind, figures: readonly Figure[]): DemoMaterial {
  return {
    id: `material:${key}`,
    name: kind.name,
    family: kind.family,
    referenceCelsius: 20,
    referenceHumidityPercent: 50,
    attendedMinutes: kind.attended ?? 0,
    dwells: figures.map((figure) => dwellOf(figure, kind.band)),
    cautions: cautionsForFamily(kind.family),
    note: kind.note ?? '',
  };
}

function dwellOf([milestone, hours, law, source]: Figure, band: Band): MaterialDwell {
  const [low, likely, high] = hours.map((value) => Math.round(value * 60));
  return {
    milestone,
    minutes: { low, likely, high },
    law,
    minimumCelsius: band.minimum,
    maximumCelsius: band.maximum,
    source,
  };
}
