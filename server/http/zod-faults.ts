import type { FieldFault } from '@common/contract';
import type { z } from 'zod';

type Issue = z.core.$ZodRawIssue;

const KINDS_OF_VALUE: Readonly<Record<string, string>> = {
  string: 'a text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  object: 'a record',
  null: 'nothing',
};

const FORMATS: Readonly<Record<string, string>> = {
  uuid: 'This is not an id.',
  email: 'Write the whole e-mail address.',
  datetime: 'Write the instant in UTC, such as 2026-05-04T09:30:00Z.',
  date: 'Write the day as year, month, day, such as 2026-05-04.',
  safeint: 'This should be a whole number.',
};

/** Says what is wrong with a value in plain words; a schema's own sentence goes before it. */
export function sayIssue(issue: Issue): string {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? 'This is missing.'
        : `This should be ${KINDS_OF_VALUE[issue.expected] ?? issue.expected}.`;
    case 'too_small':
      return issue.origin === 'string' || issue.origin === 'array'
        ? `This needs at least ${String(issue.minimum)}${issue.origin === 'string' ? ' characters' : ''}.`
        : `This should be at least ${String(issue.minimum)}.`;
    case 'too_big':
      return issue.origin === 'string' || issue.origin === 'array'
        ? `This may have at most ${String(issue.maximum)}${issue.origin === 'string' ? ' characters' : ''}.`
        : `This should be at most ${String(issue.maximum)}.`;
    case 'invalid_format':
      return FORMATS[issue.format] ?? 'This is not written as it should be.';
    case 'invalid_value':
      return `This should be one of: ${issue.values.map(String).join(', ')}.`;
    case 'unrecognized_keys':
      return `These are not known here: ${issue.keys.join(', ')}.`;
    case 'invalid_union':
      return 'This fits none of the shapes that it may have.';
    default:
      return 'This is not right.';
  }
}

/** Every issue of a failed parse as a fault with a JSON pointer (RFC 6901) into the body. */
export function bodyFaults(error: z.core.$ZodError): FieldFault[] {
  return error.issues.map((issue) => ({ pointer: pointerOf(issue.path), detail: issue.message }));
}

/** Every issue of a failed parse of a query, named `?name`. */
export function queryFaults(error: z.core.$ZodError): FieldFault[] {
  return error.issues.map((issue) => ({ pointer: `?${issue.path.map(String).join('.')}`, detail: issue.message }));
}

function pointerOf(path: readonly PropertyKey[]): string {
  return path.map((part) => `/${String(part).replace(/~/g, '~0').replace(/\//g, '~1')}`).join('');
}
