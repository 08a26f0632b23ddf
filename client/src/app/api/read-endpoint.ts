import { httpResource } from '@angular/common/http';
import { computed, linkedSignal, type Signal } from '@angular/core';
import type { Endpoint } from '@common/contract';
import { type ApiFailure, toApiFailure, unreadable } from './api-failure';
import { type EndpointRequest, type EndpointResponse, type LooseRequest, pathOf, queryOf } from './endpoint-request';

/**
 * How a read stands. `stale`: what is shown is from before, because a newer read is under way or failed. `idle`: nothing was
 * asked for yet.
 */
export type ReadState = 'idle' | 'loading' | 'ready' | 'empty' | 'stale' | 'failed';

/** A read that a view shows: its value, how it stands, and what went wrong. */
export interface EndpointRead<T> {
  readonly state: Signal<ReadState>;
  /** The last good answer to the present request; undefined before the first. */
  readonly value: Signal<T | undefined>;
  readonly failure: Signal<ApiFailure | null>;
  /** Asks again; the last good answer stays in view meanwhile. */
  reload(): void;
  /** Puts a value that a write answered in place of what was read, without asking again. */
  set(value: T): void;
}

/**
 * Reads a GET endpoint for a view, again whenever the signals that `request` reads have changed; the latest request wins. Give
 * `undefined` to wait. Call it where `inject()` may be called. The experimental `httpResource` does not leave this file.
 */
export function readEndpoint<E extends Endpoint>(
  endpoint: E,
  request: () => EndpointRequest<E> | undefined = () => ({}) as EndpointRequest<E>,
): EndpointRead<EndpointResponse<E>> {
  type Value = EndpointResponse<E>;
  const address = computed(() => {
    const given: LooseRequest | undefined = request();
    return given && { url: pathOf(endpoint, given.params), params: queryOf(given.query) };
  });
  const resource = httpResource<Value>(() => address(), { parse: (answer) => parse(endpoint, answer) });

  const value = linkedSignal<{ key: string; fresh: Value | undefined }, Value | undefined>({
    source: () => ({
      key: JSON.stringify(address() ?? null),
      fresh: resource.hasValue() ? resource.value() : undefined,
    }),
    computation: ({ key, fresh }, previous) => fresh ?? (previous?.source.key === key ? previous.value : undefined),
  });
  const failure = computed(() => {
    const error = resource.error();
    return error === undefined ? null : toApiFailure(error.cause ?? error);
  });
  const state = computed<ReadState>(() => {
    const known = value();
    if (resource.isLoading()) {
      return known === undefined ? 'loading' : 'stale';
    }
    if (failure() !== null) {
      return known === undefined ? 'failed' : 'stale';
    }
    if (known === undefined) {
      return 'idle';
    }
    return Array.isArray(known) && known.length === 0 ? 'empty' : 'ready';
  });

  return {
    state,
    value: value.asReadonly(),
    failure,
    reload: () => void resource.reload(),
    set: (next) => resource.set(next),
  };
}

function parse<E extends Endpoint>(endpoint: E, answer: unknown): EndpointResponse<E> {
  const parsed = endpoint.response.safeParse(answer);
  if (!parsed.success) {
    throw unreadable(endpoint.status, null);
  }
  return parsed.data as EndpointResponse<E>;
}
