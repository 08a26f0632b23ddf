/**
 * One stage after another. `finish` of the first stage is the end of its dwell unless `after` says `work`; `finish` of the second
 * is always the end of its work. Gaps are minutes, and may be negative for an overlap; `maxGapMinutes` null for no upper end.
 * `clock` gaps run day and night, `working` ones only while the studio is at work (a gap of 0 or more also forbids the second end
 * to come first by the clock). A maximum gap is the design's maximum time lag (RCPSP/max).
 */
export interface Link {
  readonly fromStageId: string;
  readonly toStageId: string;
  readonly kind: LinkKind;
  readonly after: 'dwell' | 'work';
  readonly minGapMinutes: number;
  readonly maxGapMinutes: number | null;
  readonly time: 'clock' | 'working';
}

/** Which ends of the two stages a link ties. */
export type LinkKind = 'finish-start' | 'start-start' | 'finish-finish' | 'start-finish';
