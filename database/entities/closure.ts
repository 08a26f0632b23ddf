import { Check, Column, Entity, PrimaryColumn } from 'typeorm';
import { dayRange, type DayRangeValue } from '../column-values';

/** Days on which the studio is closed. */
@Entity({ name: 'closure' })
@Check('closure_days_check', 'not isempty(days)')
export class Closure {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'daterange', transformer: dayRange })
  days: DayRangeValue;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
