/**
 * How the surroundings move a dwell. `factor-per-10-degrees` is the rule that ten degrees more divide the time by `factor`
 * (2 for the common doubling rule); `nurse-saul` counts degrees above a datum; `evaporation` dries by humidity.
 */
export type DwellLaw =
  | { readonly kind: 'none' }
  | { readonly kind: 'arrhenius'; readonly activationEnergyJPerMol: number }
  | { readonly kind: 'factor-per-10-degrees'; readonly factor: number }
  | { readonly kind: 'nurse-saul'; readonly datumCelsius: number }
  | { readonly kind: 'evaporation' };

/** A law with the climate at which its minutes are stated and the temperatures outside which it is not trusted. */
export interface DwellBehaviour {
  readonly law: DwellLaw;
  readonly referenceCelsius: number;
  readonly referenceHumidityPercent: number;
  /** Below this nothing advances; null where no minimum is known. */
  readonly minimumCelsius: number | null;
  /** Above this the figure is not trusted, and the rate is that at the maximum; null where none is known. */
  readonly maximumCelsius: number | null;
}
