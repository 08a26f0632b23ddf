import { Account } from './account';
import { AuditEntry } from './audit-entry';
import { Bay } from './bay';
import { BayOpening } from './bay-opening';
import { Client } from './client';
import { Climate } from './climate';
import { ClimateReading } from './climate-reading';
import { Closure } from './closure';
import { Craft } from './craft';
import { DateForecast } from './date-forecast';
import { FeedState } from './feed-state';
import { FeedToken } from './feed-token';
import { IssuedEntry } from './issued-entry';
import { IssuedOccupancy } from './issued-occupancy';
import { IssuedPlan } from './issued-plan';
import { IssuedShift } from './issued-shift';
import { KeyDate } from './key-date';
import { KeyDatePiece } from './key-date-piece';
import { Leave } from './leave';
import { LevelRun } from './level-run';
import { Link } from './link';
import { Maker } from './maker';
import { MakerCraft } from './maker-craft';
import { MakerPattern } from './maker-pattern';
import { Material } from './material';
import { MaterialDwell } from './material-dwell';
import { Piece } from './piece';
import { PlanSearch } from './plan-search';
import { Production } from './production';
import { Purchase } from './purchase';
import { Recipe } from './recipe';
import { RecipeStep } from './recipe-step';
import { RecipeStepCrew } from './recipe-step-crew';
import { RecipeStepPlace } from './recipe-step-place';
import { RecipeStepPlaceBay } from './recipe-step-place-bay';
import { Session } from './session';
import { Stage } from './stage';
import { StageBay } from './stage-bay';
import { StageCrew } from './stage-crew';
import { StageMaker } from './stage-maker';
import { StagePlace } from './stage-place';
import { StagePlaceBay } from './stage-place-bay';
import { StageReport } from './stage-report';
import { Studio } from './studio';
import { WorkingRevision } from './working-revision';

export * from './account';
export * from './audit-entry';
export * from './bay';
export * from './bay-opening';
export * from './client';
export * from './climate';
export * from './climate-reading';
export * from './closure';
export * from './craft';
export * from './date-forecast';
export * from './draft-columns';
export * from './feed-state';
export * from './feed-token';
export * from './issued-entry';
export * from './issued-occupancy';
export * from './issued-plan';
export * from './issued-shift';
export * from './key-date';
export * from './key-date-piece';
export * from './leave';
export * from './level-run';
export * from './link';
export * from './maker';
export * from './maker-craft';
export * from './maker-pattern';
export * from './material';
export * from './material-dwell';
export * from './pattern-columns';
export * from './piece';
export * from './plan-search';
export * from './production';
export * from './purchase';
export * from './recipe';
export * from './recipe-step';
export * from './recipe-step-crew';
export * from './recipe-step-place';
export * from './recipe-step-place-bay';
export * from './session';
export * from './stage';
export * from './stage-bay';
export * from './stage-crew';
export * from './stage-maker';
export * from './stage-place';
export * from './stage-place-bay';
export * from './stage-report';
export * from './studio';
export * from './working-revision';

/** Every table, listed by hand: a glob would not survive bundling. */
export const entities = [
  Account,
  AuditEntry,
  Bay,
  BayOpening,
  Client,
  Climate,
  ClimateReading,
  Closure,
  Craft,
  DateForecast,
  FeedState,
  FeedToken,
  IssuedEntry,
  IssuedOccupancy,
  IssuedPlan,
  IssuedShift,
  KeyDate,
  KeyDatePiece,
  Leave,
  LevelRun,
  Link,
  Maker,
  MakerCraft,
  MakerPattern,
  Material,
  MaterialDwell,
  Piece,
  PlanSearch,
  Production,
  Purchase,
  Recipe,
  RecipeStep,
  RecipeStepCrew,
  RecipeStepPlace,
  RecipeStepPlaceBay,
  Session,
  Stage,
  StageBay,
  StageCrew,
  StageMaker,
  StagePlace,
  StagePlaceBay,
  StageReport,
  Studio,
  WorkingRevision,
] as const;
