import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Account } from './account';
import { Maker } from './maker';
import { Production } from './production';

/** A calendar address: only the SHA-256 of its secret is kept. */
@Entity({ name: 'feed_token' })
@Unique('feed_token_token_hash_key', ['tokenHash'])
@Index('feed_token_account_id_idx', ['accountId'])
@Check('feed_token_token_hash_check', 'octet_length(token_hash) = 32')
@Check('feed_token_scope_check', `scope in ('maker', 'production', 'studio')`)
@Check('feed_token_maker_check', `(scope = 'maker') = (maker_id is not null)`)
@Check('feed_token_production_check', `(scope = 'production') = (production_id is not null)`)
export class FeedToken {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'bytea' })
  tokenHash: Buffer;

  @Column({ type: 'uuid' })
  accountId: string;

  @ManyToOne(() => Account, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'account_id' })
  account: Relation<Account>;

  @Column({ type: 'text' })
  scope: 'maker' | 'production' | 'studio';

  @Column({ type: 'uuid', nullable: true })
  makerId: string | null;

  @ManyToOne(() => Maker, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker> | null;

  @Column({ type: 'uuid', nullable: true })
  productionId: string | null;

  @ManyToOne(() => Production, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'production_id' })
  production: Relation<Production> | null;

  @Column({ type: 'timestamptz' })
  createdAt: Date;

  @Column({ type: 'timestamptz', nullable: true })
  lastReadAt: Date | null;

  @Column({ type: 'timestamptz', nullable: true })
  revokedAt: Date | null;
}
