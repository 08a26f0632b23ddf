/** Stands in for the browser's EventSource; a spec says what the server does. */
export class FakeEventSource {
  onopen: (() => void) | null = null;
  onerror: (() => void) | null = null;
  onmessage: ((event: { data: unknown }) => void) | null = null;
  /** 0 connecting, 1 open, 2 closed, as in the WHATWG standard. */
  readyState = 0;
  private readonly listeners = new Map<string, (event: { data: unknown }) => void>();

  constructor(readonly url: string) {}

  addEventListener(name: string, listener: (event: { data: unknown }) => void): void {
    this.listeners.set(name, listener);
  }

  close(): void {
    this.readyState = 2;
  }

  /** The server accepted the stream. */
  accept(): void {
    this.readyState = 1;
    this.onopen?.();
  }

  /** The stream broke; the browser tries again, or gave up. */
  breakOff(then: 'tries-again' | 'gave-up'): void {
    this.readyState = then === 'gave-up' ? 2 : 0;
    this.onerror?.();
  }

  /** The server told something. */
  tell(event: unknown): void {
    this.onmessage?.({ data: typeof event === 'string' ? event : JSON.stringify(event) });
  }
}
