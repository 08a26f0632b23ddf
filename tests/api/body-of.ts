import type { z } from 'zod';
import type { Answer } from './studio';

/** An answer's body by the contract's schema; throws where it is not of that shape. */
export function bodyOf<S extends z.ZodType>(schema: S, answer: Pick<Answer, 'body'>): z.output<S> {
  return schema.parse(answer.body);
}
