import { Check, Column, Entity, OneToMany, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { MaterialDwell } from './material-dwell';

/** A material of the library, whose dwells stages refer to. */
@Entity({ name: 'material' })
@Unique('material_name_key', ['name'])
@Check('material_reference_humidity_percent_check', 'reference_humidity_percent between 0 and 100')
@Check('material_attended_minutes_check', 'attended_minutes >= 0')
export class Material {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text' })
  family: string;

  @Column({ type: 'double precision' })
  referenceCelsius: number;

  @Column({ type: 'double precision' })
  referenceHumidityPercent: number;

  /** Minutes after the work during which someone stays by it. */
  @Column({ type: 'integer' })
  attendedMinutes: number;

  @Column({ type: 'text', array: true, default: () => `'{}'` })
  cautions: string[];

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @OneToMany(() => MaterialDwell, (dwell) => dwell.material)
  dwells: Relation<MaterialDwell>[];
}
