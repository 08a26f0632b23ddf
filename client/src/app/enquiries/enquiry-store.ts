import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { endpoints, type ProductionSummary, type PromiseSearchView } from '@common/contract';
import { Api, onLiveEvent, readEndpoint, reloadOnChange, toApiFailure } from '../api';

/** How often to ask after a question where no live event says how it stands. */
const ASK_EVERY_MS = 1_000;

/** One enquiry, the last promise for it, and a question under way. Provided by the page that shows it. */
@Injectable()
export class EnquiryStore {
  private readonly api = inject(Api);
  private readonly shownId = signal<string | null>(null);
  private readonly busyNow = signal(false);
  private readonly troubleNow = signal<string | null>(null);
  private readonly endingNow = signal<string | null>(null);
  private readonly askedNow = signal<PromiseSearchView | null>(null);
  private timer: ReturnType<typeof setInterval> | undefined;

  readonly read = readEndpoint(endpoints.readProduction, () => {
    const id = this.shownId();
    return id === null ? undefined : { params: { id } };
  });
  readonly promises = readEndpoint(endpoints.listPromises);

  /** The newest question: the one asked here, else the newest that the server knows. */
  readonly promise = computed<PromiseSearchView | null>(() => {
    const id = this.shownId();
    const asked = this.askedNow();
    const known = this.promises.value()?.find(({ productionId }) => productionId === id) ?? null;
    return asked?.productionId === id && asked.state !== 'cancelled' && asked.state !== 'failed'
      ? newer(asked, known)
      : known;
  });
  readonly underWay = computed(() => isUnderWay(this.promise()));
  /** How far it has come, 0 to 100. */
  readonly percent = computed(() => {
    const { weighed, of } = this.promise() ?? { weighed: 0, of: 0 };
    return of === 0 ? 0 : (100 * weighed) / of;
  });
  readonly busy = this.busyNow.asReadonly();
  /** What went wrong with the last thing that was tried. */
  readonly trouble = this.troubleNow.asReadonly();
  /** How the last question ended without an answer. */
  readonly ending = this.endingNow.asReadonly();

  constructor() {
    inject(DestroyRef).onDestroy(() => clearInterval(this.timer));
    reloadOnChange(this.read, 'production', 'key-date', 'piece', 'stage');
    reloadOnChange(this.promises, 'production', 'key-date', 'piece', 'stage', 'maker', 'leave', 'bay');
    onLiveEvent((event) => {
      if (event?.kind === 'plan-revised') this.promises.reload();
    });
  }

  /** Which enquiry to show. */
  show(id: string): void {
    this.shownId.set(id);
  }

  /** Asks when it could be delivered. */
  async ask(): Promise<void> {
    const productionId = this.shownId();
    if (productionId === null) return;
    this.endingNow.set(null);
    await this.attempt(async () => {
      const { id } = await this.api.callEndpoint(endpoints.startPromise, { body: { productionId } });
      await this.look(id);
      clearInterval(this.timer);
      this.timer = setInterval(() => void this.look(id), ASK_EVERY_MS);
    });
  }

  /** Stops the question under way. */
  async stop(): Promise<void> {
    const id = this.promise()?.id;
    if (id === undefined) return;
    await this.attempt(async () => {
      await this.api.callEndpoint(endpoints.cancelPromise, { params: { id } });
      await this.look(id);
    });
  }

  /** Promises it to the client, or declines it. Whether that came about. */
  async settle(state: Extract<ProductionSummary['state'], 'committed' | 'declined'>): Promise<boolean> {
    const production = this.read.value();
    if (!production) return false;
    return this.attempt(async () => {
      const { id, version } = production;
      this.read.set(
        await this.api.callEndpoint(endpoints.changeProduction, { params: { id }, body: { version, state } }),
      );
    });
  }

  private async look(id: string): Promise<void> {
    const view = await this.api.callEndpoint(endpoints.readPromise, { params: { id } }).catch(() => null);
    if (view === null) return;
    this.askedNow.set(view);
    if (isUnderWay(view)) return;
    clearInterval(this.timer);
    if (view.state === 'cancelled') this.endingNow.set('It was stopped; nothing of it was kept.');
    if (view.state === 'failed') this.endingNow.set(view.failure ?? 'It failed. Ask again.');
    this.promises.reload();
  }

  private async attempt(step: () => Promise<void>): Promise<boolean> {
    this.busyNow.set(true);
    this.troubleNow.set(null);
    try {
      await step();
      return true;
    } catch (error) {
      this.troubleNow.set(toApiFailure(error).detail);
      return false;
    } finally {
      this.busyNow.set(false);
    }
  }
}

/** The one asked later; of the same question, the one that the server was last asked about. */
function newer(asked: PromiseSearchView, known: PromiseSearchView | null): PromiseSearchView {
  if (known === null || known.startedAt < asked.startedAt) return asked;
  return known.id === asked.id && isUnderWay(known) ? asked : known;
}

function isUnderWay(run: PromiseSearchView | null): boolean {
  return run !== null && (run.state === 'waiting' || run.state === 'running');
}
