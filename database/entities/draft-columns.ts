import { Column, JoinColumn, ManyToOne, type Relation } from 'typeorm';
import { Material } from './material';

/** The latest end of a dwell by which followers start, and what missing it costs. */
export interface DwellWindowValue {
  readonly kind: 'hard' | 'soft';
  readonly minutes: number;
  readonly extraMinutes: number;
  readonly costMinor: number;
}

/** What a stage of a piece and a step of a recipe have in common; crafts and bays are rows beside. */
export abstract class DraftColumns {
  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text' })
  kind: 'make' | 'sign-off' | 'check' | 'transport';

  /** Hands-on person-minutes when all goes well, as a rule, and when much goes wrong. */
  @Column({ type: 'integer' })
  lowMinutes: number;

  @Column({ type: 'integer' })
  likelyMinutes: number;

  @Column({ type: 'integer' })
  highMinutes: number;

  @Column({ type: 'integer' })
  crewLossPermille: number;

  @Column({ type: 'text' })
  continuity: 'session' | 'shifts' | 'free' | 'clock';

  /** Null where nothing dwells; then the other dwell columns are null as well. */
  @Column({ type: 'integer', nullable: true })
  dwellMinutes: number | null;

  @Column({ type: 'integer', nullable: true })
  dwellAttendedMinutes: number | null;

  @Column({ type: 'uuid', nullable: true })
  dwellMaterialId: string | null;

  @ManyToOne(() => Material, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'dwell_material_id' })
  dwellMaterial: Relation<Material> | null;

  @Column({ type: 'text', nullable: true })
  dwellMilestone: string | null;

  @Column({ type: 'jsonb', nullable: true })
  dwellWindow: DwellWindowValue | null;

  @Column({ type: 'text', array: true, default: () => `'{}'` })
  cautions: string[];

  @Column({ type: 'text', default: '' })
  note: string;

  /** For a sign-off: the agreed instant of the visit. */
  @Column({ type: 'timestamptz', nullable: true })
  visitAt: Date | null;

  /** For a sign-off: the usual time to an answer by message. */
  @Column({ type: 'integer', default: 0 })
  replyMinutes: number;
}
