import {
  Column,
  DeleteDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  OneToMany,
  PrimaryColumn,
  type Relation,
} from 'typeorm';
import { Production } from './production';
import { Recipe } from './recipe';
import { Stage } from './stage';

/** A thing being made. Removing it only marks it, for an issued plan may still name it until the next one. */
@Entity({ name: 'piece' })
@Index('piece_production_id_idx', ['productionId'])
export class Piece {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  productionId: string;

  @ManyToOne(() => Production, (production) => production.pieces, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'production_id' })
  production: Relation<Production>;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'integer' })
  position: number;

  /** What it was made from; the recipe may have changed since. */
  @Column({ type: 'uuid', nullable: true })
  recipeId: string | null;

  @ManyToOne(() => Recipe, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'recipe_id' })
  recipe: Relation<Recipe> | null;

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @DeleteDateColumn({ type: 'timestamptz', nullable: true })
  removedAt: Date | null;

  @OneToMany(() => Stage, (stage) => stage.piece)
  stages: Relation<Stage>[];
}
