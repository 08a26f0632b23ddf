import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { type MeasureValue, WorkingRevision } from './working-revision';

/** Weights and limits of the studio, checked whole by the contract's `StudioSettings` before they are written. */
export interface StudioSettingsValue {
  readonly changePenaltyMinor: number;
  readonly unevennessWeight: number;
  readonly earlinessWeight: number;
  readonly freezeMinutes: number;
  readonly restBetweenMinutes: number;
  readonly dayLimitMinutes: number;
  readonly weekLimitMinutes: number;
  readonly roomTemperatureCelsius: number;
  readonly roomHumidityPercent: number;
  readonly overtimePermille: number;
}

/** How the forecast draws, checked whole by the contract's `ForecastSettings` before it is written. */
export interface ForecastSettingsValue {
  readonly draws: number;
  readonly learning: 'past-hours' | 'estimates';
  readonly dwellLowPermille: number;
  readonly dwellHighPermille: number;
  readonly replyLowPermille: number;
  readonly replyHighPermille: number;
  readonly deliveryLatePermille: number;
  readonly absencePermille: number;
  readonly climateSpreadPermille: number;
}

/** What may be proposed for a date at risk, checked whole by the contract's `RescueSettings` before it is written. */
export interface RescueSettingsValue {
  readonly allowed: readonly MeasureValue['kind'][];
  readonly eveningMinutes: number;
  readonly eveningDays: number;
  readonly weekendMinutes: number;
  readonly freelancerDayMinor: number;
  readonly freelancerDays: number;
  readonly heatCelsius: number;
  readonly heatHourMinor: number;
  readonly mouldMinor: number;
  readonly materialMinor: number;
  readonly signOffMinor: number;
  readonly partDeliveryMinor: number;
  readonly laterDayMinor: number;
  readonly laterDays: number;
  readonly goalPermille: number;
}

/** The workshop: one row in each installation, made by the first migration. It also points at the head of the working plan. */
@Entity({ name: 'studio' })
@Unique('studio_single_key', ['single'])
@Check('studio_single_check', 'single')
@Check('studio_currency_check', `currency ~ '^[A-Z]{3}$'`)
export class Studio {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  /** Always true and unique: what makes a second row impossible. */
  @Column({ type: 'boolean', default: true })
  single: boolean;

  @Column({ type: 'text' })
  name: string;

  /** IANA zone. */
  @Column({ type: 'text' })
  zone: string;

  /** ISO 4217 code. */
  @Column({ type: 'text' })
  currency: string;

  @Column({ type: 'jsonb' })
  settings: StudioSettingsValue;

  @Column({ type: 'jsonb' })
  forecast: ForecastSettingsValue;

  @Column({ type: 'jsonb' })
  rescue: RescueSettingsValue;

  /** The working revision that stands; null until the first plan is laid out. */
  @Column({ type: 'uuid', nullable: true })
  headRevisionId: string | null;

  @ManyToOne(() => WorkingRevision, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'head_revision_id' })
  headRevision: Relation<WorkingRevision> | null;

  /** Counts up with every change, undo and redo of the working plan. */
  @Column({ type: 'integer', default: 0 })
  planRevision: number;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
