import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { endpoints, type RescueSearchView } from '@common/contract';
import { Api, type ApiFailure, toApiFailure } from '../../api';

/** How often to ask how a search stands. */
const ASK_EVERY_MS = 500;

/** One search for what would save a date, from its start to what is taken of it. */
@Injectable()
export class RescueStore {
  private readonly api = inject(Api);
  private readonly searchNow = signal<RescueSearchView | null>(null);
  private readonly failureNow = signal<ApiFailure | null>(null);
  private readonly busyNow = signal(false);
  private timer: ReturnType<typeof setTimeout> | undefined;

  readonly search = this.searchNow.asReadonly();
  readonly failure = this.failureNow.asReadonly();
  /** A request that changes something is on its way. */
  readonly busy = this.busyNow.asReadonly();
  readonly underWay = computed(() => {
    const state = this.searchNow()?.state;
    return state === 'waiting' || state === 'running';
  });

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.timer));
  }

  /** Starts to search; whatever was found before is forgotten. */
  start(keyDateId: string): Promise<void> {
    this.searchNow.set(null);
    return this.attempt(async () => {
      this.show(await this.api.callEndpoint(endpoints.startRescue, { body: { keyDateId } }));
    });
  }

  /** Stops; what was found so far stays. */
  stop(): Promise<void> {
    const id = this.searchNow()?.id;
    if (id === undefined) return Promise.resolve();
    return this.attempt(async () => {
      this.show(await this.api.callEndpoint(endpoints.cancelRescue, { params: { id } }));
    });
  }

  /** Lets the working plan count on what was found at a place of the list. True where it was taken. */
  async take(rescue: number): Promise<boolean> {
    const id = this.searchNow()?.id;
    if (id === undefined) return false;
    await this.attempt(async () => {
      const { revision } = await this.api.callEndpoint(endpoints.readPlan, {});
      await this.api.callEndpoint(endpoints.takeRescue, { params: { id }, body: { revision, rescue } });
      this.searchNow.set(null);
    });
    return this.failureNow() === null;
  }

  private show(search: RescueSearchView): void {
    this.searchNow.set(search);
    clearTimeout(this.timer);
    if (this.underWay()) this.timer = setTimeout(() => void this.look(search.id), ASK_EVERY_MS);
  }

  private async look(id: string): Promise<void> {
    try {
      this.show(await this.api.callEndpoint(endpoints.readRescue, { params: { id } }));
    } catch (error) {
      this.failureNow.set(toApiFailure(error));
    }
  }

  private async attempt(work: () => Promise<void>): Promise<void> {
    this.busyNow.set(true);
    this.failureNow.set(null);
    try {
      await work();
    } catch (error) {
      this.failureNow.set(toApiFailure(error));
    } finally {
      this.busyNow.set(false);
    }
  }
}
