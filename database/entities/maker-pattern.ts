import { Check, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Maker } from './maker';
import { PatternColumns } from './pattern-columns';

/** When a maker works. */
@Entity({ name: 'maker_pattern' })
@Check('maker_pattern_start_minute_of_day_check', 'start_minute_of_day between 0 and 1439')
@Check('maker_pattern_length_minutes_check', 'length_minutes between 15 and 1440')
@Check('maker_pattern_kind_check', `kind in ('ordinary', 'overtime')`)
export class MakerPattern extends PatternColumns {
  @PrimaryColumn({ type: 'uuid' })
  makerId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => Maker, (maker) => maker.patterns, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker>;
}
