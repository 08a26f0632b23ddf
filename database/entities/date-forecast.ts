import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { KeyDate } from './key-date';

/** How a key date was forecast when it was last looked at on a day of the studio: what later days are compared with. */
@Entity({ name: 'date_forecast' })
@Check('date_forecast_miss_chance_check', 'miss_chance between 0 and 1')
export class DateForecast {
  @PrimaryColumn({ type: 'date' })
  day: string;

  @PrimaryColumn({ type: 'uuid' })
  keyDateId: string;

  @ManyToOne(() => KeyDate, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'key_date_id' })
  keyDate: Relation<KeyDate>;

  @Column({ type: 'double precision' })
  missChance: number;

  /** Minutes since 1970-01-01T00:00Z. */
  @Column({ type: 'integer' })
  p80: number;
}
