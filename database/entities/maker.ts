import { Check, Column, Entity, OneToMany, PrimaryColumn, type Relation } from 'typeorm';
import { bigintAsNumber } from '../column-values';
import { Leave } from './leave';
import { MakerCraft } from './maker-craft';
import { MakerPattern } from './maker-pattern';

/** A person who does hands-on work. */
@Entity({ name: 'maker' })
@Check('maker_hour_cost_minor_check', 'hour_cost_minor >= 0')
@Check('maker_day_limit_minutes_check', 'day_limit_minutes between 0 and 1440')
@Check('maker_week_limit_minutes_check', 'week_limit_minutes between 0 and 10080')
export class Maker {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text' })
  initials: string;

  /** Cost of one ordinary hour in minor units. */
  @Column({ type: 'bigint', transformer: bigintAsNumber })
  hourCostMinor: number;

  /** Own limit, or null for the studio's. */
  @Column({ type: 'integer', nullable: true })
  dayLimitMinutes: number | null;

  @Column({ type: 'integer', nullable: true })
  weekLimitMinutes: number | null;

  @Column({ type: 'boolean', default: true })
  active: boolean;

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @OneToMany(() => MakerCraft, (craft) => craft.maker)
  crafts: Relation<MakerCraft>[];

  @OneToMany(() => MakerPattern, (pattern) => pattern.maker)
  patterns: Relation<MakerPattern>[];

  @OneToMany(() => Leave, (leave) => leave.maker)
  leave: Relation<Leave>[];
}
