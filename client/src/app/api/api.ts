import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Endpoint } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { toApiFailure, unreadable } from './api-failure';
import { type EndpointRequest, type EndpointResponse, type LooseRequest, pathOf, queryOf } from './endpoint-request';

/** Nothing to give where an endpoint takes nothing; otherwise its request. */
export type RequestArguments<E extends Endpoint> =
  Record<never, never> extends EndpointRequest<E> ? [request?: EndpointRequest<E>] : [request: EndpointRequest<E>];

/** The one way to write to the server: a call typed and checked by the contract. Reads for views go through `readEndpoint`. */
@Injectable({ providedIn: 'root' })
export class Api {
  private readonly http = inject(HttpClient);

  /** Calls an endpoint and parses its answer; rejects with an `ApiFailure` and with nothing else. */
  async callEndpoint<E extends Endpoint>(endpoint: E, ...[request]: RequestArguments<E>): Promise<EndpointResponse<E>> {
    const given: LooseRequest = request ?? {};
    const answer = await this.send(endpoint, given);
    if (endpoint.status === 204) {
      return undefined as EndpointResponse<E>;
    }
    const parsed = endpoint.response.safeParse(answer);
    if (!parsed.success) {
      throw unreadable(endpoint.status, null);
    }
    return parsed.data as EndpointResponse<E>;
  }

  private async send(endpoint: Endpoint, given: LooseRequest): Promise<unknown> {
    try {
      return await firstValueFrom(
        this.http.request<unknown>(endpoint.method, pathOf(endpoint, given.params), {
          body: given.body,
          params: queryOf(given.query),
        }),
      );
    } catch (error) {
      throw toApiFailure(error);
    }
  }
}
