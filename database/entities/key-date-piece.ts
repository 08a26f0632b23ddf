import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { KeyDate } from './key-date';
import { Piece } from './piece';

/** A piece that has to be ready by a key date. */
@Entity({ name: 'key_date_piece' })
export class KeyDatePiece {
  @PrimaryColumn({ type: 'uuid' })
  keyDateId: string;

  @PrimaryColumn({ type: 'uuid' })
  pieceId: string;

  @ManyToOne(() => KeyDate, (keyDate) => keyDate.pieces, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'key_date_id' })
  keyDate: Relation<KeyDate>;

  @ManyToOne(() => Piece, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'piece_id' })
  piece: Relation<Piece>;
}
