import { Check, Column, Entity, Index, JoinColumn, ManyToOne, OneToMany, PrimaryColumn, type Relation } from 'typeorm';
import { BayOpening } from './bay-opening';
import { Piece } from './piece';

/** Inner size in whole millimetres. */
export interface BaySizeValue {
  readonly lengthMm: number;
  readonly widthMm: number;
  readonly heightMm: number | null;
}

/** A place or a machine that work occupies, or the mould of a piece. Names are unique but for moulds, which their piece tells apart. */
@Entity({ name: 'bay' })
@Index('bay_name_key', { synchronize: false })
@Check(
  'bay_kind_check',
  `kind in ('booth', 'welding', 'hot-wire', 'table', 'oven', 'floor', 'store', 'mould', 'other')`,
)
@Check('bay_capacity_check', 'capacity between 1 and 50')
@Check('bay_humidity_percent_check', 'humidity_percent between 0 and 100')
@Check('bay_piece_check', `piece_id is null or kind = 'mould'`)
export class Bay {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text' })
  kind: 'booth' | 'welding' | 'hot-wire' | 'table' | 'oven' | 'floor' | 'store' | 'mould' | 'other';

  @Column({ type: 'integer' })
  capacity: number;

  @Column({ type: 'uuid', nullable: true })
  pieceId: string | null;

  @ManyToOne(() => Piece, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'piece_id' })
  piece: Relation<Piece> | null;

  /** Null for the room's. */
  @Column({ type: 'double precision', nullable: true })
  temperatureCelsius: number | null;

  @Column({ type: 'double precision', nullable: true })
  humidityPercent: number | null;

  @Column({ type: 'jsonb', nullable: true })
  size: BaySizeValue | null;

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'boolean', default: true })
  active: boolean;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @OneToMany(() => BayOpening, (opening) => opening.bay)
  openings: Relation<BayOpening>[];
}
