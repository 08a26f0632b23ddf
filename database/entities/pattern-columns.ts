import { Column } from 'typeorm';

/** What every recurring stretch of the day has: an RFC 5545 rule over days, and a start and length by the studio's clock. */
export abstract class PatternColumns {
  @Column({ type: 'date' })
  firstDay: string;

  @Column({ type: 'text' })
  rule: string;

  @Column({ type: 'integer' })
  startMinuteOfDay: number;

  @Column({ type: 'integer' })
  lengthMinutes: number;

  /** The rule's exceptions (EXDATE). */
  @Column({ type: 'date', array: true, default: () => `'{}'` })
  exceptDays: string[];

  @Column({ type: 'text', default: 'ordinary' })
  kind: 'ordinary' | 'overtime';
}
