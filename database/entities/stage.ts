import {
  Check,
  Column,
  DeleteDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  OneToMany,
  PrimaryColumn,
  type Relation,
} from 'typeorm';
import { DraftColumns } from './draft-columns';
import { Piece } from './piece';
import { StageBay } from './stage-bay';
import { StageCrew } from './stage-crew';
import { StageMaker } from './stage-maker';
import { StagePlace } from './stage-place';

/** One step of making a piece, and how far it has come. Removing it only marks it; see `Piece`. */
@Entity({ name: 'stage' })
@Index('stage_piece_id_idx', ['pieceId'])
@Check('stage_kind_check', `kind in ('make', 'sign-off', 'check', 'transport')`)
@Check('stage_continuity_check', `continuity in ('session', 'shifts', 'free', 'clock')`)
@Check('stage_hands_on_check', '0 <= low_minutes and low_minutes <= likely_minutes and likely_minutes <= high_minutes')
@Check('stage_crew_loss_permille_check', 'crew_loss_permille between 0 and 500')
@Check('stage_dwell_minutes_check', 'dwell_minutes >= 0 and dwell_attended_minutes >= 0')
@Check('stage_dwell_check', '(dwell_minutes is null) = (dwell_attended_minutes is null)')
@Check('stage_nth_check', '(nth is null) = (repeats is null) and 1 <= nth and nth <= repeats')
@Check('stage_state_check', `state in ('to-do', 'started', 'paused', 'finished')`)
@Check('stage_started_check', `(state = 'to-do') = (started_at is null)`)
@Check('stage_finished_check', `(state = 'finished') = (finished_at is not null)`)
@Check('stage_times_check', 'started_at <= finished_at')
@Check('stage_spent_minutes_check', 'spent_minutes >= 0 and remaining_minutes >= 0')
@Check('stage_decision_check', `decision is null or (decision in ('approved', 'changes-asked') and kind = 'sign-off')`)
export class Stage extends DraftColumns {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  pieceId: string;

  @ManyToOne(() => Piece, (piece) => piece.stages, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'piece_id' })
  piece: Relation<Piece>;

  @Column({ type: 'integer' })
  position: number;

  /** Which repeat it is of how many; both null where it stands alone. */
  @Column({ type: 'integer', nullable: true })
  nth: number | null;

  @Column({ type: 'integer', nullable: true })
  repeats: number | null;

  @Column({ type: 'text', default: 'to-do' })
  state: 'to-do' | 'started' | 'paused' | 'finished';

  @Column({ type: 'timestamptz', nullable: true })
  startedAt: Date | null;

  @Column({ type: 'timestamptz', nullable: true })
  finishedAt: Date | null;

  @Column({ type: 'integer', default: 0 })
  spentMinutes: number;

  /** What the crew says is left, in person-minutes; null where nobody said. */
  @Column({ type: 'integer', nullable: true })
  remainingMinutes: number | null;

  /** For a sign-off: what the client last decided. */
  @Column({ type: 'text', nullable: true })
  decision: 'approved' | 'changes-asked' | null;

  @Column({ type: 'timestamptz', nullable: true })
  decidedAt: Date | null;

  @Column({ type: 'text', default: '' })
  decisionNote: string;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @DeleteDateColumn({ type: 'timestamptz', nullable: true })
  removedAt: Date | null;

  @OneToMany(() => StageCrew, (crew) => crew.stage)
  crew: Relation<StageCrew>[];

  @OneToMany(() => StagePlace, (place) => place.stage)
  places: Relation<StagePlace>[];

  @OneToMany(() => StageMaker, (maker) => maker.stage)
  makers: Relation<StageMaker>[];

  @OneToMany(() => StageBay, (bay) => bay.stage)
  bays: Relation<StageBay>[];
}
