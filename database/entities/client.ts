import { Column, Entity, PrimaryColumn, Unique } from 'typeorm';

/** Who a production is made for. */
@Entity({ name: 'client' })
@Unique('client_name_key', ['name'])
export class Client {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
