import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Dates } from './dates';
import type { Forecasts } from './forecast/forecasts';
import type { Issues } from './issues';
import type { LevelRuns } from './level-runs';
import type { Loads } from './load-view';
import type { Proposals } from './proposals';
import type { Promises } from './searches/promises';
import type { Rescues } from './searches/rescues';
import type { Revisions } from './revisions';
import type { WorkingPlan } from './working-plan';

/** What the routes of planning work with. */
export interface PlanningParts {
  readonly workingPlan: WorkingPlan;
  readonly revisions: Revisions;
  readonly levelRuns: LevelRuns;
  readonly proposals: Proposals;
  readonly issues: Issues;
  readonly dates: Dates;
  readonly loads: Loads;
  readonly forecasts: Forecasts;
  readonly rescues: Rescues;
  readonly promises: Promises;
}

/** The working plan, levelling and issuing. */
export function mountPlanning(api: Api, parts: PlanningParts): void {
  const { workingPlan, revisions, levelRuns, proposals, issues, dates, loads, forecasts } = parts;
  api.on(endpoints.readPlan, () => workingPlan.read());
  api.on(endpoints.moveStage, ({ actor, body }) => revisions.move(actor, body));
  api.on(endpoints.releasePin, ({ actor, body }) => revisions.release(actor, body));
  api.on(endpoints.undo, ({ actor, body }) => revisions.undo(actor, body.revision));
  api.on(endpoints.redo, ({ actor, body }) => revisions.redo(actor, body.revision));
  api.on(endpoints.startLevel, ({ actor, body }) => levelRuns.start(actor, body));
  api.on(endpoints.readLevel, ({ params }) => levelRuns.read(params.id));
  api.on(endpoints.cancelLevel, ({ params }) => levelRuns.cancel(params.id));
  api.on(endpoints.readProposal, ({ params }) => proposals.read(params.id));
  api.on(endpoints.takeLevel, ({ actor, params, body }) => proposals.take(actor, params.id, body.revision));
  api.on(endpoints.leaveLevel, ({ actor, params }) => levelRuns.leave(actor, params.id));
  api.on(endpoints.previewIssue, () => issues.preview());
  api.on(endpoints.issue, ({ actor, body }) => issues.issue(actor, body));
  api.on(endpoints.listIssued, () => issues.list());
  api.on(endpoints.readDates, () => dates.read());
  api.on(endpoints.readForecast, () => forecasts.read());
  api.on(endpoints.stopForecast, () => forecasts.stop());
  api.on(endpoints.readPastHours, () => forecasts.pastHours());
  api.on(endpoints.readLoad, ({ query }) => loads.read(query.by));
  mountSearches(api, parts);
}

/** What would save a date, and when an enquiry could be ready. */
function mountSearches(api: Api, { rescues, promises }: PlanningParts): void {
  api.on(endpoints.startRescue, ({ actor, body }) => rescues.start(actor, body.keyDateId));
  api.on(endpoints.readRescue, ({ params }) => rescues.read(params.id));
  api.on(endpoints.cancelRescue, ({ params }) => rescues.cancel(params.id));
  api.on(endpoints.takeRescue, ({ actor, params, body }) => rescues.take(actor, params.id, body));
  api.on(endpoints.listMeasures, () => rescues.measures());
  api.on(endpoints.dropMeasure, ({ actor, body }) => rescues.drop(actor, body));
  api.on(endpoints.startPromise, ({ actor, body }) => promises.start(actor, body));
  api.on(endpoints.listPromises, () => promises.list());
  api.on(endpoints.readPromise, ({ params }) => promises.read(params.id));
  api.on(endpoints.cancelPromise, ({ params }) => promises.cancel(params.id));
}
