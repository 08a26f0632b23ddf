import { Check, Column, Entity, Exclusion, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { dayRange, type DayRangeValue } from '../column-values';
import { Maker } from './maker';

/** Days on which a maker does not work; one maker's leave never overlaps. */
@Entity({ name: 'leave' })
@Check('leave_days_check', 'not isempty(days)')
@Exclusion('leave_no_overlap', 'USING gist (maker_id WITH =, days WITH &&)')
export class Leave {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  makerId: string;

  @ManyToOne(() => Maker, (maker) => maker.leave, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker>;

  @Column({ type: 'daterange', transformer: dayRange })
  days: DayRangeValue;

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
