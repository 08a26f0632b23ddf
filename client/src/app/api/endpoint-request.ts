import type { Endpoint } from '@common/contract';
import type { z } from 'zod';

type Part<Key extends string, Schema extends z.ZodType> = [unknown] extends [z.input<Schema>]
  ? { readonly [K in Key]?: z.input<Schema> }
  : Record<never, never> extends z.input<Schema>
    ? { readonly [K in Key]?: z.input<Schema> }
    : undefined extends z.input<Schema>
      ? { readonly [K in Key]?: undefined }
      : { readonly [K in Key]: z.input<Schema> };

/** What a call of an endpoint needs: its path parameters, query and body, each required only where the contract says so. */
export type EndpointRequest<E extends Endpoint> = Part<'params', E['params']> &
  Part<'query', E['query']> &
  Part<'body', E['body']>;

/** What an endpoint answers. */
export type EndpointResponse<E extends Endpoint> = z.output<E['response']>;

/** The three parts of a request without their types, for the code that only passes them on. */
export interface LooseRequest {
  readonly params?: unknown;
  readonly query?: unknown;
  readonly body?: unknown;
}

/** The path of an endpoint with its parameters in place, each percent-encoded. */
export function pathOf(endpoint: Endpoint, params: unknown): string {
  const values = (params ?? {}) as Readonly<Record<string, unknown>>;
  return endpoint.path.replace(/:([A-Za-z]+)/g, (_whole, name: string) => {
    const value = values[name];
    if (typeof value !== 'string' && typeof value !== 'number') {
      throw new Error(`${endpoint.method} ${endpoint.path} needs “${name}”.`);
    }
    return encodeURIComponent(value);
  });
}

/** A query as HttpClient takes it; absent values are left out. */
export function queryOf(query: unknown): Record<string, string | number | boolean> {
  const entries = Object.entries((query ?? {}) as Readonly<Record<string, unknown>>);
  return Object.fromEntries(
    entries.filter((entry): entry is [string, string | number | boolean] =>
      ['string', 'number', 'boolean'].includes(typeof entry[1]),
    ),
  );
}
