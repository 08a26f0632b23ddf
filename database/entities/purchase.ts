import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { bigintAsNumber } from '../column-values';
import { Production } from './production';
import { Stage } from './stage';

/** A bought-in part and the stage that needs it. */
@Entity({ name: 'purchase' })
@Index('purchase_production_id_idx', ['productionId'])
@Check('purchase_lead_days_check', 'lead_days between 0 and 730')
@Check('purchase_cost_minor_check', 'cost_minor >= 0')
@Check('purchase_order_check', 'ordered_on <= received_on')
export class Purchase {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  productionId: string;

  @ManyToOne(() => Production, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'production_id' })
  production: Relation<Production>;

  @Column({ type: 'uuid' })
  stageId: string;

  @ManyToOne(() => Stage, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text', default: '' })
  supplier: string;

  @Column({ type: 'integer' })
  leadDays: number;

  @Column({ type: 'date', nullable: true })
  orderedOn: string | null;

  @Column({ type: 'date', nullable: true })
  dueOn: string | null;

  @Column({ type: 'date', nullable: true })
  receivedOn: string | null;

  @Column({ type: 'bigint', transformer: bigintAsNumber })
  costMinor: number;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
