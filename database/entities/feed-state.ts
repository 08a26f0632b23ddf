import { Check, Column, Entity, PrimaryColumn } from 'typeorm';

/**
 * What the calendar addresses of one scope last showed. The next answer is compared with it, so that an entry's sequence and the
 * calendar's Last-Modified only ever rise. It belongs to no address: all addresses of a scope show the same.
 */
@Entity({ name: 'feed_state' })
@Check('feed_state_text_hash_check', 'octet_length(text_hash) = 32')
export class FeedState {
  /** `maker.<id>`, `production.<id>` or `studio`. */
  @PrimaryColumn({ type: 'text' })
  scope: string;

  /** The history as server/feeds reads it back through its schema. */
  @Column({ type: 'jsonb' })
  history: unknown;

  /** SHA-256 of the calendar's bytes. */
  @Column({ type: 'bytea' })
  textHash: Buffer;

  /** When the bytes last changed. */
  @Column({ type: 'timestamptz' })
  changedAt: Date;
}
