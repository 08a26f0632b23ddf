import { Check, Column, Entity, Index, JoinColumn, ManyToOne, OneToMany, PrimaryColumn, type Relation } from 'typeorm';
import { KeyDatePiece } from './key-date-piece';
import { Production } from './production';

/** A date of a production by which it has to be ready. */
@Entity({ name: 'key_date' })
@Index('key_date_production_id_idx', ['productionId'])
@Check(
  'key_date_kind_check',
  `kind in ('rehearsal-loan', 'delivery', 'get-in', 'fit-up', 'technical-rehearsal', 'dress-rehearsal', 'opening')`,
)
@Check('key_date_strength_check', `strength in ('hard', 'wished')`)
@Check('key_date_weight_check', 'weight between 1 and 1000')
export class KeyDate {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  productionId: string;

  @ManyToOne(() => Production, (production) => production.keyDates, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'production_id' })
  production: Relation<Production>;

  @Column({ type: 'text' })
  kind: 'rehearsal-loan' | 'delivery' | 'get-in' | 'fit-up' | 'technical-rehearsal' | 'dress-rehearsal' | 'opening';

  @Column({ type: 'timestamptz' })
  at: Date;

  @Column({ type: 'text' })
  strength: 'hard' | 'wished';

  @Column({ type: 'integer' })
  weight: number;

  @Column({ type: 'integer', default: 1 })
  version: number;

  /** The pieces that have to be ready by it; none for every piece of the production. */
  @OneToMany(() => KeyDatePiece, (piece) => piece.keyDate)
  pieces: Relation<KeyDatePiece>[];
}
