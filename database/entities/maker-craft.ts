import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Craft } from './craft';
import { Maker } from './maker';

/** A craft that a maker holds, and the pace at it: 1000 is usual. */
@Entity({ name: 'maker_craft' })
@Check('maker_craft_pace_permille_check', 'pace_permille between 100 and 3000')
export class MakerCraft {
  @PrimaryColumn({ type: 'uuid' })
  makerId: string;

  @PrimaryColumn({ type: 'uuid' })
  craftId: string;

  @ManyToOne(() => Maker, (maker) => maker.crafts, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker>;

  @ManyToOne(() => Craft, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'craft_id' })
  craft: Relation<Craft>;

  @Column({ type: 'integer' })
  pacePermille: number;
}
