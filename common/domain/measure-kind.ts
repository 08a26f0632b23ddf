/** Changes that may save a key date, by name; what each does stands in common/rescue. */
export const MEASURE_KINDS = [
  'overtime',
  'weekend-shift',
  'freelancer',
  'heat',
  'second-mould',
  'faster-material',
  'earlier-sign-off',
  'part-delivery',
  'later-date',
] as const;
export type MeasureKind = (typeof MEASURE_KINDS)[number];
