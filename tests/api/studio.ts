import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { randomUUID } from 'node:crypto';
import type { Role } from '@common/contract';
import { Account, AuditEntry, Client, Maker } from '@database/entities';
import { compose, type Running } from '../../server/composition';
import { readConfig, type Config } from '../../server/config';
import { createLog } from '../../server/http/log';
import { hashPassword } from '../../server/session';
import { withDatabase, type TestDatabase } from '../support/test-database';

/** What every account of the tests signs in with. */
export const PASSWORD = 'a plain test password';

/** An answer as a test reads it. */
export interface Answer {
  readonly status: number;
  // eslint-disable-next-line @typescript-eslint/no-explicit-any -- the server checks answers by schema; a test names what it looks at
  readonly body: any;
  readonly headers: Headers;
}

/** A browser: it keeps its cookie and sends the session's token back. */
export class Visitor {
  cookie = '';
  token = '';
  /** Sent with every request, over what a browser would send. */
  extraHeaders: Record<string, string> = {};

  constructor(private readonly address: () => string) {}

  get(path: string): Promise<Answer> {
    return this.send('GET', path);
  }
  post(path: string, body?: unknown): Promise<Answer> {
    return this.send('POST', path, body);
  }
  put(path: string, body?: unknown): Promise<Answer> {
    return this.send('PUT', path, body);
  }
  patch(path: string, body?: unknown): Promise<Answer> {
    return this.send('PATCH', path, body);
  }
  delete(path: string): Promise<Answer> {
    return this.send('DELETE', path);
  }

  async send(method: string, path: string, body?: unknown): Promise<Answer> {
    return this.sendText(method, path, body === undefined ? undefined : JSON.stringify(body), 'application/json');
  }

  async sendText(method: string, path: string, body: string | undefined, contentType: string): Promise<Answer> {
    const response = await fetch(`${this.address()}${path}`, {
      method,
      redirect: 'manual',
      headers: {
        ...(body !== undefined && { 'Content-Type': contentType }),
        ...(this.cookie !== '' && { Cookie: this.cookie }),
        ...(this.token !== '' && { 'X-Fettle-Token': this.token }),
        ...this.extraHeaders,
      },
      body,
    });
    const given = response.headers.getSetCookie().find((cookie) => cookie.startsWith('fettle='));
    if (given !== undefined) this.cookie = given.split(';')[0];
    const text = await response.text();
    const isJson = (response.headers.get('content-type') ?? '').includes('json');
    const parsed: unknown = isJson && text !== '' ? JSON.parse(text) : text;
    const token = (parsed as { formToken?: unknown } | null)?.formToken;
    if (typeof token === 'string') this.token = token;
    return { status: response.status, body: parsed, headers: response.headers };
  }

  /** Opens the page and signs in. */
  async signIn(email: string, password: string = PASSWORD): Promise<Answer> {
    await this.get('/api/session');
    return this.post('/api/session', { email, password });
  }

  /** Reads server-sent events from now on into `events`; call the result to stop. */
  async listen(): Promise<{ readonly events: Record<string, unknown>[]; stop(): void; readonly ended: Promise<void> }> {
    const abort = new AbortController();
    const response = await fetch(`${this.address()}/api/live`, {
      headers: { Cookie: this.cookie },
      signal: abort.signal,
    });
    if (response.status !== 200 || !response.body) throw new Error(`The stream answers ${String(response.status)}.`);
    const events: Record<string, unknown>[] = [];
    const reader = response.body.pipeThrough(new TextDecoderStream()).getReader();
    let rest = '';
    const read = async (): Promise<void> => {
      for (;;) {
        const { done, value } = await reader.read();
        if (done) return;
        rest += value;
        const blocks = rest.split('\n\n');
        rest = blocks.pop() ?? '';
        for (const block of blocks) {
          if (block.startsWith('data: ')) events.push(JSON.parse(block.slice(6)) as Record<string, unknown>);
        }
      }
    };
    const ended = read().catch(() => undefined);
    return { events, stop: () => abort.abort(), ended };
  }
}

/** A server process of the application, in this process. */
export interface TestServer {
  readonly url: string;
  readonly running: Running;
  stop(): Promise<void>;
}

/** What a test may set otherwise. */
export interface StudioOptions {
  readonly database?: TestDatabase;
  readonly config?: Partial<Config>;
  readonly clock?: () => Date;
}

/** A studio with an account of each role, served from a database of its own. */
export interface TestStudio {
  readonly database: TestDatabase;
  readonly url: string;
  readonly running: Running;
  /** Somebody who has signed in with that role; a fresh one at each call. */
  as(role: Role): Promise<Visitor>;
  /** Somebody who has opened the page and signed in as nobody. */
  nobody(): Promise<Visitor>;
  visitor(): Visitor;
  /** The maker of the account `maker@…` and the client of the account `client@…`. */
  readonly makerId: string;
  readonly clientId: string;
  /** A second server process on the same database. */
  another(): Promise<TestServer>;
  /** What the audit trail says of a record, newest first. */
  trail(subjectId: string): Promise<AuditEntry[]>;
}

/** The address of the account of a role. */
export function emailOf(role: Role): string {
  return `${role}@studio.test`;
}

/** Serves the application for the length of a file or a `describe`; read it inside the tests. */
export function withStudio(options: StudioOptions = {}): TestStudio {
  let server: TestServer | undefined;
  const others: TestServer[] = [];
  const ids = { makerId: randomUUID(), clientId: randomUUID() };
  // Jest ends things in the order of their mention: first the servers, then the database under them.
  afterAll(async () => {
    for (const one of [...others, ...(server ? [server] : [])]) await one.stop();
  });
  const database = options.database ?? withDatabase();
  const present = () => {
    if (!server) throw new Error('The studio is there only inside tests and hooks.');
    return server;
  };
  const visitor = () => new Visitor(() => present().url);
  beforeAll(async () => {
    await addPeople(database, ids);
    server = await serve(database.url, options);
  }, 60_000);
  return {
    database,
    ...ids,
    get url() {
      return present().url;
    },
    get running() {
      return present().running;
    },
    visitor,
    async as(role) {
      const one = visitor();
      const { status } = await one.signIn(emailOf(role));
      if (status !== 200) throw new Error(`Signing in as ${role} answers ${String(status)}.`);
      return one;
    },
    async nobody() {
      const one = visitor();
      await one.get('/api/session');
      return one;
    },
    async another() {
      const one = await serve(database.url, options);
      others.push(one);
      return one;
    },
    trail: (subjectId) => database.dataSource.manager.find(AuditEntry, { where: { subjectId }, order: { at: 'DESC' } }),
  };
}

async function addPeople({ dataSource }: TestDatabase, { makerId, clientId }: { makerId: string; clientId: string }) {
  const passwordHash = await hashPassword(PASSWORD);
  const { manager } = dataSource;
  const maker = { id: makerId, name: 'Mara Test', initials: 'MT', hourCostMinor: 2500 };
  await manager.insert(Maker, maker);
  await manager.insert(Client, { id: clientId, name: `Client ${clientId}` });
  for (const role of ['owner', 'manager', 'maker', 'client'] as const) {
    await manager.insert(Account, {
      id: randomUUID(),
      name: `The ${role}`,
      email: emailOf(role),
      role,
      passwordHash,
      makerId: role === 'maker' ? makerId : null,
      clientId: role === 'client' ? clientId : null,
    });
  }
}

async function serve(databaseUrl: string, options: StudioOptions): Promise<TestServer> {
  const environment = {
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: 'known to everybody, and good for tests alone',
    LOG_LEVEL: 'silent',
    CLIENT_FOLDER: '/nonexistent',
  };
  const config = {
    ...readConfig(environment),
    limits: { requestsPerMinute: 100_000, failedSignIns: 1000 },
    ...options.config,
  };
  const running = await compose(config, createLog('silent'), options.clock);
  const server = createServer(running.app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  return { url: `http://127.0.0.1:${String(port)}`, running, stop: () => stop(server, running) };
}

async function stop(server: Server, running: Running): Promise<void> {
  running.endLivePages();
  server.closeAllConnections();
  await new Promise<void>((resolve) => server.close(() => resolve()));
  await running.stop();
}

/** Waits until something holds; fails after five seconds. */
export async function eventually(holds: () => boolean | Promise<boolean>): Promise<void> {
  const until = Date.now() + 5000;
  while (!(await holds())) {
    if (Date.now() > until) throw new Error('It did not come about within five seconds.');
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}
