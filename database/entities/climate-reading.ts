import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Bay } from './bay';

/** One reading of a logger in the studio or in a bay. */
@Entity({ name: 'climate_reading' })
@Check('climate_reading_place_check', `place = coalesce(bay_id::text, 'room')`)
@Check('climate_reading_humidity_check', 'humidity_percent between 0 and 100')
export class ClimateReading {
  /** `room`, or the bay's id. */
  @PrimaryColumn({ type: 'text' })
  place: string;

  /** Minutes since 1970-01-01T00:00Z. */
  @PrimaryColumn({ type: 'integer' })
  at: number;

  @Column({ type: 'uuid', nullable: true })
  bayId: string | null;

  @ManyToOne(() => Bay, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay> | null;

  @Column({ type: 'double precision' })
  celsius: number;

  @Column({ type: 'double precision' })
  humidityPercent: number;
}
