import { Client } from 'pg';
import { LiveEvent } from '@common/contract';
import type { Log } from '../http/log';
import { CANCEL_CHANNEL, LIVE_CHANNEL } from '../storage/live-channel';
import type { ProcessMark } from '../storage/process-mark';

const RECONNECT_MS = 1000;

type Listener = (event: LiveEvent) => void;

/**
 * Hears on one connection of its own what any server process announced, and passes it to this process's open pages. A connection
 * that breaks is made again; `onGap` then lets listeners know that they may have missed something.
 */
export class LiveHub {
  readonly #listeners = new Set<Listener>();
  readonly #gapListeners = new Set<() => void>();
  readonly #cancelListeners = new Set<(runId: string) => void>();
  #client: Client | null = null;
  #retry: NodeJS.Timeout | null = null;
  #stopped = false;

  constructor(
    private readonly databaseUrl: string,
    private readonly log: Log,
    /** The connection also holds the mark by which others see that this process is there. */
    readonly mark: ProcessMark,
  ) {}

  async start(): Promise<void> {
    const client = new Client({ connectionString: this.databaseUrl, application_name: 'fettle live' });
    client.on('notification', ({ channel, payload = '' }) => {
      if (channel === CANCEL_CHANNEL) for (const listener of this.#cancelListeners) listener(payload);
      else this.#pass(payload);
    });
    client.on('error', (error) => this.#reconnect(client, error));
    client.on('end', () => this.#reconnect(client, null));
    await client.connect();
    await client.query(`listen ${LIVE_CHANNEL}; listen ${CANCEL_CHANNEL}`);
    await this.mark.holdOn(client);
    this.#client = client;
  }

  async stop(): Promise<void> {
    this.#stopped = true;
    if (this.#retry) clearTimeout(this.#retry);
    const client = this.#client;
    this.#client = null;
    this.#listeners.clear();
    this.#gapListeners.clear();
    this.#cancelListeners.clear();
    await client?.end();
  }

  /** Calls `listener` with every event from now on, until the returned function is called. */
  listen(listener: Listener): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  /** Calls `listener` when events may have been missed, until the returned function is called. */
  onGap(listener: () => void): () => void {
    this.#gapListeners.add(listener);
    return () => this.#gapListeners.delete(listener);
  }

  /** Calls `listener` with whatever some process was asked to stop: the id of a levelling, or another word. */
  onCancel(listener: (runId: string) => void): void {
    this.#cancelListeners.add(listener);
  }

  /** Ends every open page's stream; each connects again by itself, to whichever process is there. */
  endStreams(): void {
    this.#gapListeners.forEach((listener) => listener());
  }

  #pass(payload: string): void {
    let parsed: ReturnType<typeof LiveEvent.safeParse>;
    try {
      parsed = LiveEvent.safeParse(JSON.parse(payload));
    } catch {
      return;
    }
    // Another version of the server may say what this one does not know.
    if (parsed.success) for (const listener of this.#listeners) listener(parsed.data);
  }

  #reconnect(client: Client, error: Error | null): void {
    if (this.#stopped || this.#client !== client) return;
    this.#client = null;
    this.log.warn({ err: error }, 'the connection for live events broke; connecting again');
    client.end().catch(() => undefined);
    this.#tryAgain();
  }

  #tryAgain(): void {
    this.#retry = setTimeout(() => {
      this.start().then(
        () => this.endStreams(),
        () => (this.#stopped ? undefined : this.#tryAgain()),
      );
    }, RECONNECT_MS);
  }
}
