import { z } from 'zod';

/** What a signed-in account may do. An owner may do all that a manager may. */
export const ROLES = ['owner', 'manager', 'maker', 'client'] as const;
export const Role = z.enum(ROLES);
export type Role = (typeof ROLES)[number];

/** Who may call a route: everybody, or the listed roles. A record's own rule (a client's productions) is checked besides. */
export type Audience = 'anyone' | readonly Role[];

export const OFFICE = ['owner', 'manager'] as const satisfies readonly Role[];
export const WORKSHOP = ['owner', 'manager', 'maker'] as const satisfies readonly Role[];
export const EVERYBODY = ROLES;
export const OWNER = ['owner'] as const satisfies readonly Role[];

/** One route of the API: the single source of its validation at both ends, its permission and its OpenAPI entry. */
export interface Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Response extends z.ZodType = z.ZodType,
> {
  readonly method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  /** Path below the origin, parameters as `:name`. */
  readonly path: `/api/${string}`;
  readonly who: Audience;
  readonly summary: string;
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly response: Response;
  /** Status of the success answer. */
  readonly status: 200 | 201 | 202 | 204;
}

const Nothing = z.undefined();
const NoFields = z.object({});

type Part<T extends z.ZodType | undefined, Fallback extends z.ZodType> = T extends z.ZodType ? T : Fallback;

/** Declares a route, filling in what it does not use. */
export function endpoint<
  P extends z.ZodType | undefined = undefined,
  Q extends z.ZodType | undefined = undefined,
  B extends z.ZodType | undefined = undefined,
  R extends z.ZodType | undefined = undefined,
>(given: {
  method: Endpoint['method'];
  path: Endpoint['path'];
  who: Audience;
  summary: string;
  params?: P;
  query?: Q;
  body?: B;
  response?: R;
  status?: Endpoint['status'];
}): Endpoint<Part<P, typeof NoFields>, Part<Q, typeof NoFields>, Part<B, typeof Nothing>, Part<R, typeof Nothing>> {
  return {
    method: given.method,
    path: given.path,
    who: given.who,
    summary: given.summary,
    params: (given.params ?? NoFields) as Part<P, typeof NoFields>,
    query: (given.query ?? NoFields) as Part<Q, typeof NoFields>,
    body: (given.body ?? Nothing) as Part<B, typeof Nothing>,
    response: (given.response ?? Nothing) as Part<R, typeof Nothing>,
    status: given.status ?? (given.response ? 200 : 204),
  };
}

/** Parameters of a route that names one record. */
export const ById = z.object({ id: z.uuid() });
