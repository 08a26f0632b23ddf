import { Check, Column, Entity, PrimaryColumn, Unique } from 'typeorm';

/** A skill of the trade. */
@Entity({ name: 'craft' })
@Unique('craft_key_key', ['key'])
@Check('craft_key_check', `key ~ '^[a-z][a-z0-9-]{0,39}$'`)
export class Craft {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  key: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
