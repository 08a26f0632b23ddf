import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A browser's session, written by connect-pg-simple; its column names are that package's. */
@Entity({ name: 'session' })
@Index('session_expire_idx', ['expire'])
export class Session {
  @PrimaryColumn({ type: 'character varying' })
  sid: string;

  @Column({ type: 'json' })
  sess: unknown;

  @Column({ type: 'timestamp', precision: 6 })
  expire: Date;
}
