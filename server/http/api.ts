import { Router, type Request, type RequestHandler, type Response } from 'express';
import type { Endpoint } from '@common/contract';
import type { z } from 'zod';
import type { Actor } from '../session/actor';
import { refuseForeignRequest } from './form-token';
import { invalidFields, notFound, Problem } from './problem';
import { bodyFaults, queryFaults, sayIssue } from './zod-faults';

/** One call of a route, parsed by its contract. */
export interface Call<E extends Endpoint> {
  readonly params: z.output<E['params']>;
  readonly query: z.output<E['query']>;
  readonly body: z.output<E['body']>;
  readonly request: Request;
  readonly response: Response;
}

/** A call by somebody who is signed in and in the route's audience. */
export interface SignedInCall<E extends Endpoint> extends Call<E> {
  readonly actor: Actor;
}

/** A call of a route for anyone. */
export interface OpenCall<E extends Endpoint> extends Call<E> {
  readonly actor: Actor | null;
}

type Answer<E extends Endpoint> = z.input<E['response']> extends undefined ? void : z.input<E['response']>;

/**
 * The contract's routes as an Express router. What each route checks, in this order: who calls, that the call comes from our own
 * page, and the shape of what was sent; then the handler; then the shape of the answer, which also drops what the contract does
 * not name.
 */
export class Api {
  readonly router = Router();
  readonly #methods = new Map<string, Set<string>>();

  constructor(private readonly publicUrl: string | null) {}

  /** Answers a route that is for some roles. */
  on<E extends Endpoint>(
    endpoint: E,
    handler: (call: SignedInCall<E>) => Promise<Answer<E>>,
    ...before: RequestHandler[]
  ): void {
    this.#mount(endpoint, before, async (request, response) => {
      const actor = requireAudience(endpoint.who, request.user ?? null);
      refuseForeignRequest(request, this.publicUrl);
      return handler({ ...parse(endpoint, request), actor, request, response });
    });
  }

  /** Answers a route that is for anyone. */
  onOpen<E extends Endpoint>(
    endpoint: E,
    handler: (call: OpenCall<E>) => Promise<Answer<E>>,
    ...before: RequestHandler[]
  ): void {
    if (endpoint.who !== 'anyone') throw new Error(`${endpoint.path} is not for anyone.`);
    this.#mount(endpoint, before, async (request, response) => {
      refuseForeignRequest(request, this.publicUrl);
      return handler({ ...parse(endpoint, request), actor: request.user ?? null, request, response });
    });
  }

  /** To be called once, after all routes: says which methods an address answers, and that there is nothing elsewhere. */
  close(): void {
    for (const [path, methods] of this.#methods) {
      const allowed = [...methods].sort().join(', ');
      this.router.all(path, () => {
        throw new Problem('wrong-method', `This address answers ${allowed}.`, { headers: { Allow: allowed } });
      });
    }
    this.router.all('/api/{*rest}', () => {
      throw new Problem('not-found', 'There is nothing at this address.');
    });
  }

  /** Whether a route was mounted: the composition's own check that the contract is kept whole. */
  has(endpoint: Endpoint): boolean {
    return this.#methods.get(endpoint.path)?.has(endpoint.method) ?? false;
  }

  #mount(
    endpoint: Endpoint,
    before: readonly RequestHandler[],
    answer: (request: Request, response: Response) => Promise<unknown>,
  ): void {
    const methods = this.#methods.get(endpoint.path) ?? new Set<string>();
    if (methods.has(endpoint.method)) throw new Error(`${endpoint.method} ${endpoint.path} is mounted twice.`);
    this.#methods.set(endpoint.path, methods.add(endpoint.method));
    const verb = endpoint.method.toLowerCase() as Lowercase<Endpoint['method']>;
    this.router[verb](endpoint.path, ...before, async (request: Request, response: Response) => {
      const result = await answer(request, response);
      if (endpoint.status === 204) response.status(204).end();
      else response.status(endpoint.status).json(checkAnswer(endpoint, result));
    });
  }
}

function requireAudience(who: Endpoint['who'], actor: Actor | null): Actor {
  if (actor === null) throw new Problem('not-signed-in', 'Sign in to go on.');
  if (who !== 'anyone' && !who.includes(actor.role)) {
    throw new Problem('not-allowed', `This is not for a ${actor.role}.`);
  }
  return actor;
}

function parse<E extends Endpoint>(endpoint: E, request: Request): Pick<Call<E>, 'params' | 'query' | 'body'> {
  const error = sayIssue;
  const params = endpoint.params.safeParse(request.params);
  // An id that can not be one names nothing.
  if (!params.success) throw notFound('record');
  const query = endpoint.query.safeParse(request.query, { error });
  const takesBody = endpoint.method !== 'GET' && !endpoint.body.safeParse(undefined).success;
  const body = endpoint.body.safeParse(takesBody ? (request.body as unknown) : undefined, { error });
  if (!query.success || !body.success) {
    throw invalidFields([
      ...(query.success ? [] : queryFaults(query.error)),
      ...(body.success ? [] : bodyFaults(body.error)),
    ]);
  }
  return { params: params.data, query: query.data, body: body.data } as Pick<Call<E>, 'params' | 'query' | 'body'>;
}

function checkAnswer(endpoint: Endpoint, result: unknown): unknown {
  const checked = endpoint.response.safeParse(result);
  if (checked.success) return checked.data;
  const where = checked.error.issues.map((issue) => `${issue.path.map(String).join('/')}: ${issue.message}`);
  throw new Error(`${endpoint.method} ${endpoint.path} does not answer as its contract says. ${where.join('; ')}`);
}
