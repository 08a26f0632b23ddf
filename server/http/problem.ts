import { PROBLEM_KINDS, type FieldFault, type ProblemKind } from '@common/contract';

/** What a problem says beside its kind. */
export interface ProblemParts {
  readonly errors?: readonly FieldFault[];
  /** At a version conflict: the record as it is stored now. */
  readonly current?: unknown;
  /** At a version conflict: what was sent. */
  readonly sent?: unknown;
  /** Headers that belong to the answer, such as `Allow`. */
  readonly headers?: Readonly<Record<string, string>>;
}

/** Something that a caller did or met, of the closed list of kinds; becomes RFC 9457 problem details on the wire. */
export class Problem extends Error {
  override readonly name = 'Problem';

  constructor(
    readonly kind: ProblemKind,
    /** A sentence that a person can act on. */
    readonly detail: string,
    readonly parts: ProblemParts = {},
  ) {
    super(detail);
  }

  get status(): number {
    return PROBLEM_KINDS[this.kind].status;
  }
}

/** One field is not right; `pointer` is an RFC 6901 pointer into the body. */
export function invalidField(pointer: string, detail: string): Problem {
  return new Problem('invalid-input', detail, { errors: [{ pointer, detail }] });
}

/** Several fields are not right. */
export function invalidFields(errors: readonly FieldFault[]): Problem {
  const detail = errors.length === 1 ? errors[0].detail : `${errors.length} things are not right.`;
  return new Problem('invalid-input', detail, { errors });
}

/** There is no such record, or none that the caller may know of: the two are told alike. */
export function notFound(what: string): Problem {
  return new Problem('not-found', `There is no such ${what}.`);
}
