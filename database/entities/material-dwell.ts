import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Material } from './material';

/** How temperature or humidity moves a dwell, as the contract's `DwellLaw` has it. */
export type DwellLawValue =
  | { readonly kind: 'none' }
  | { readonly kind: 'arrhenius'; readonly activationEnergyJPerMol: number }
  | { readonly kind: 'factor-per-10-degrees'; readonly factor: number }
  | { readonly kind: 'nurse-saul'; readonly datumCelsius: number }
  | { readonly kind: 'evaporation' };

/** What a dwell waits for. */
export type MilestoneValue =
  'pot-life' | 'touch' | 'demould' | 'next-layer' | 'next-layer-until' | 'sandable' | 'full-cure';

/** One dwell of a material: low, likely and high minutes at its reference climate. */
@Entity({ name: 'material_dwell' })
@Unique('material_dwell_milestone_key', ['materialId', 'milestone'])
@Check(
  'material_dwell_milestone_check',
  `milestone in ('pot-life', 'touch', 'demould', 'next-layer', 'next-layer-until', 'sandable', 'full-cure')`,
)
@Check(
  'material_dwell_minutes_check',
  '0 <= low_minutes and low_minutes <= likely_minutes and likely_minutes <= high_minutes',
)
@Check('material_dwell_celsius_check', 'minimum_celsius <= maximum_celsius')
export class MaterialDwell {
  @PrimaryColumn({ type: 'uuid' })
  materialId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => Material, (material) => material.dwells, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'material_id' })
  material: Relation<Material>;

  @Column({ type: 'text' })
  milestone: MilestoneValue;

  @Column({ type: 'integer' })
  lowMinutes: number;

  @Column({ type: 'integer' })
  likelyMinutes: number;

  @Column({ type: 'integer' })
  highMinutes: number;

  @Column({ type: 'jsonb' })
  law: DwellLawValue;

  @Column({ type: 'double precision', nullable: true })
  minimumCelsius: number | null;

  @Column({ type: 'double precision', nullable: true })
  maximumCelsius: number | null;

  @Column({ type: 'text' })
  source: string;
}
