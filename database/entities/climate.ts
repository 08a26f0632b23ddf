import type { ClimateProfile } from '@common/dwell/climate-profile';
import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Bay } from './bay';

/** The place of the studio itself, where a climate is nobody's in particular. */
export const ROOM_PLACE = 'room';

/** The climate of the studio or of a bay over the seasons and the week. */
@Entity({ name: 'climate' })
@Check('climate_place_check', `place = coalesce(bay_id::text, 'room')`)
export class Climate {
  /** `room`, or the bay's id. */
  @PrimaryColumn({ type: 'text' })
  place: string;

  @Column({ type: 'uuid', nullable: true })
  bayId: string | null;

  @ManyToOne(() => Bay, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay> | null;

  /** Null where it was let go; the version goes on counting. */
  @Column({ type: 'jsonb', nullable: true })
  profile: ClimateProfile | null;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
