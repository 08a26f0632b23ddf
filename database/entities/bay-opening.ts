import { Check, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Bay } from './bay';
import { PatternColumns } from './pattern-columns';

/** When work may be done in a bay; a bay without any is always open. */
@Entity({ name: 'bay_opening' })
@Check('bay_opening_start_minute_of_day_check', 'start_minute_of_day between 0 and 1439')
@Check('bay_opening_length_minutes_check', 'length_minutes between 15 and 1440')
@Check('bay_opening_kind_check', `kind in ('ordinary', 'overtime')`)
export class BayOpening extends PatternColumns {
  @PrimaryColumn({ type: 'uuid' })
  bayId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => Bay, (bay) => bay.openings, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay>;
}
