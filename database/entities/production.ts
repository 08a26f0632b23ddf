import { Check, Column, Entity, JoinColumn, ManyToOne, OneToMany, PrimaryColumn, type Relation } from 'typeorm';
import { Client } from './client';
import { KeyDate } from './key-date';
import { Piece } from './piece';

/** A job for a client. */
@Entity({ name: 'production' })
@Check('production_hue_check', 'hue between 0 and 11')
@Check('production_state_check', `state in ('tentative', 'committed', 'delivered', 'declined')`)
export class Production {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  clientId: string;

  @ManyToOne(() => Client, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'client_id' })
  client: Relation<Client>;

  @Column({ type: 'text' })
  name: string;

  /** Two letters, printed wherever the hue is used. */
  @Column({ type: 'text' })
  mark: string;

  @Column({ type: 'integer' })
  hue: number;

  @Column({ type: 'text' })
  state: 'tentative' | 'committed' | 'delivered' | 'declined';

  @Column({ type: 'text', default: '' })
  note: string;

  /** When it was entered: the order in which work is laid out at first. */
  @Column({ type: 'timestamptz', default: () => 'now()' })
  createdAt: Date;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @OneToMany(() => KeyDate, (keyDate) => keyDate.production)
  keyDates: Relation<KeyDate>[];

  @OneToMany(() => Piece, (piece) => piece.production)
  pieces: Relation<Piece>[];
}
