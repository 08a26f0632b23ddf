import { QueryFailedError } from 'typeorm';
import type { ProblemKind } from '@common/contract';
import { Problem } from '../http/problem';

/** SQLSTATE codes of PostgreSQL (appendix A of its manual) that mean something to a person. */
const UNIQUE_VIOLATION = '23505';
const FOREIGN_KEY_VIOLATION = '23503';
const CHECK_VIOLATION = '23514';
const EXCLUSION_VIOLATION = '23P01';
const SERIALIZATION_FAILURE = '40001';
const DEADLOCK = '40P01';

interface DriverError {
  readonly code?: string;
  readonly constraint?: string;
  readonly detail?: string;
}

interface Saying {
  readonly kind: ProblemKind;
  readonly detail: string;
  readonly pointer?: string;
}

/** What the constraints that people can run into say; services say most of it earlier and closer to the field. */
const SAYINGS: Readonly<Record<string, Saying>> = {
  account_email_lower_key: {
    kind: 'already-exists',
    detail: 'Somebody signs in with that e-mail address already.',
    pointer: '/email',
  },
  client_name_key: { kind: 'already-exists', detail: 'There is a client of that name.', pointer: '/name' },
  craft_key_key: { kind: 'already-exists', detail: 'There is a craft with that key.', pointer: '/key' },
  bay_name_key: { kind: 'already-exists', detail: 'There is a bay of that name.', pointer: '/name' },
  material_name_key: { kind: 'already-exists', detail: 'There is a material of that name.', pointer: '/name' },
  material_dwell_milestone_key: {
    kind: 'invalid-input',
    detail: 'A material has one dwell for each thing that it waits for.',
    pointer: '/dwells',
  },
  recipe_name_key: { kind: 'already-exists', detail: 'There is a recipe of that name.', pointer: '/name' },
  link_ends_key: { kind: 'already-exists', detail: 'These two stages are linked in that way already.' },
  leave_no_overlap: {
    kind: 'already-exists',
    detail: 'The maker is on leave on some of these days already.',
    pointer: '/days',
  },
  issued_shift_one_place_at_once: {
    kind: 'plan-unsound',
    detail: 'A maker would be at two places at once. Level, or move one of the stages.',
  },
  issued_occupancy_one_stage_a_slot: {
    kind: 'plan-unsound',
    detail: 'A bay would hold more than it can. Level, or move one of the stages.',
  },
  issued_plan_pkey: { kind: 'plan-stale', detail: 'Somebody else issued a plan at this moment. Look at it first.' },
};

/** The problem that a database error stands for; null where it is a fault of ours. */
export function databaseProblem(error: unknown): Problem | null {
  const { code, constraint, detail } = driverErrorOf(error);
  const saying = constraint === undefined ? undefined : SAYINGS[constraint];
  if (saying) {
    const errors = saying.pointer === undefined ? undefined : [{ pointer: saying.pointer, detail: saying.detail }];
    return new Problem(saying.kind, saying.detail, { errors });
  }
  switch (code) {
    case UNIQUE_VIOLATION:
    case EXCLUSION_VIOLATION:
      return new Problem('already-exists', 'There is one of these already.');
    case FOREIGN_KEY_VIOLATION:
      return detail?.includes('is still referenced')
        ? new Problem('still-in-use', 'Something else still uses this; change that first.')
        : new Problem('invalid-input', 'This refers to something that is not there.');
    case CHECK_VIOLATION:
      return new Problem('invalid-input', 'A value lies outside of what it may be.');
    case SERIALIZATION_FAILURE:
    case DEADLOCK:
      return new Problem('version-conflict', 'Others were changing the same at this moment. Try again.');
    default:
      return null;
  }
}

/** Whether the whole transaction may be tried again: others got in its way (40001, 40P01). */
export function isTransient(error: unknown): boolean {
  const { code } = driverErrorOf(error);
  return code === SERIALIZATION_FAILURE || code === DEADLOCK;
}

/** The name of the constraint that was broken; null where the error is another. */
export function brokenConstraint(error: unknown): string | null {
  return driverErrorOf(error).constraint ?? null;
}

function driverErrorOf(error: unknown): DriverError {
  return error instanceof QueryFailedError ? (error.driverError as DriverError) : {};
}
