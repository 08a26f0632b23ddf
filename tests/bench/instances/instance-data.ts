/** The published file formats that the bench reads. */
export type InstanceFormat = 'psplib' | 'rcpspmax' | 'multiproject' | 'multiskill';

/** One activity as its file states it; whole periods. */
export interface Activity {
  /** How the file calls it: its number, or `project:number` where there are several projects. */
  readonly label: string;
  readonly duration: number;
  /** Units asked of each renewable resource, in the file's order; empty for multi-skill. */
  readonly demands: readonly number[];
  /** Earliest start; 0 where the file has none. */
  readonly release: number;
}

/** start(to) >= start(from) + lag, with activities by position; a negative lag is a maximum lag the other way round. */
export interface StartLag {
  readonly from: number;
  readonly to: number;
  readonly lag: number;
}

/** Who can do what, and what each activity asks for, in a multi-skill instance. */
export interface SkillData {
  /** `required[activity][skill]`: how many people with the skill at once. */
  readonly required: readonly (readonly number[])[];
  /** `mastery[resource][skill]`. */
  readonly mastery: readonly (readonly boolean[])[];
}

/** An instance as its file states it, before it becomes a planning problem: what plans are validated against once more. */
export interface InstanceData {
  readonly format: InstanceFormat;
  /** In the order of the file, source and sink included. */
  readonly activities: readonly Activity[];
  readonly capacities: readonly number[];
  readonly arcs: readonly StartLag[];
  readonly skills: SkillData | null;
}
