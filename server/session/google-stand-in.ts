import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { text } from 'node:stream/consumers';

const LOOPBACK = '127.0.0.1';
const CODE_LIVES_MS = 60_000;

/** Somebody whom the stand-in vouches for. */
export interface StandInPerson {
  readonly subject: string;
  readonly name: string;
  readonly email: string;
  readonly isEmailVerified: boolean;
}

/** Who registered with the stand-in, and how it decides: `ask` shows a page, a function answers at once (null denies). */
export interface StandInSettings {
  readonly port: number;
  readonly clientId: string;
  readonly clientSecret: string;
  readonly decide: 'ask' | (() => StandInPerson | null);
}

/** A running stand-in. */
export interface StandIn {
  readonly url: string;
  close(): Promise<void>;
}

interface Asking {
  readonly redirectUri: string;
  readonly state: string;
  readonly challenge: string;
}

interface Grant extends Asking {
  readonly person: StandInPerson;
  readonly until: number;
}

/**
 * An identity server for development and tests, in Google's place: authorization code with PKCE (RFC 6749, RFC 7636) and the user's
 * particulars as OpenID Connect tells them. It vouches for anybody, so it listens on this machine alone and the server takes its
 * word only where its own address is on this machine too.
 */
export async function startGoogleStandIn(settings: StandInSettings): Promise<StandIn> {
  const desk = new Desk(settings);
  const server = createServer((request, response) => {
    desk.answer(request, response).catch(() => send(response, 500, { error: 'server_error' }));
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(settings.port, LOOPBACK, resolve);
  });
  return { url: `http://${LOOPBACK}:${portOf(server)}`, close: () => closeServer(server) };
}

class Desk {
  readonly #asked = new Map<string, Asking>();
  readonly #grants = new Map<string, Grant>();
  readonly #tokens = new Map<string, StandInPerson>();

  constructor(private readonly settings: StandInSettings) {}

  async answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const url = new URL(request.url ?? '/', `http://${LOOPBACK}`);
    switch (`${request.method ?? ''} ${url.pathname}`) {
      case 'GET /auth':
        return this.#authorize(url.searchParams, response);
      case 'POST /consent':
        return this.#consent(new URLSearchParams(await text(request)), response);
      case 'POST /token':
        return this.#token(new URLSearchParams(await text(request)), response);
      case 'GET /userinfo':
        return this.#particulars(request.headers.authorization ?? '', response);
      default:
        return send(response, 404, { error: 'not_found' });
    }
  }

  #authorize(query: URLSearchParams, response: ServerResponse): void {
    const asking = {
      redirectUri: query.get('redirect_uri') ?? '',
      state: query.get('state') ?? '',
      challenge: query.get('code_challenge') ?? '',
    };
    const isSound =
      query.get('client_id') === this.settings.clientId &&
      query.get('response_type') === 'code' &&
      query.get('code_challenge_method') === 'S256' &&
      new URL(asking.redirectUri).hostname === LOOPBACK;
    if (!isSound) return send(response, 400, { error: 'invalid_request' });
    if (this.settings.decide !== 'ask') return this.#goBack(asking, this.settings.decide(), response);
    const id = randomUUID();
    this.#asked.set(id, asking);
    response.writeHead(200, { 'Content-Type': 'text/html; charset=utf-8' }).end(page(id));
  }

  #consent(form: URLSearchParams, response: ServerResponse): void {
    const asking = this.#asked.get(form.get('id') ?? '');
    if (!asking) return send(response, 400, { error: 'invalid_request' });
    this.#asked.delete(form.get('id') ?? '');
    const email = form.get('email') ?? '';
    // The same address is the same person at every visit.
    const subject = createHash('sha256').update(email.toLowerCase()).digest('hex').slice(0, 21);
    const person = { subject, name: email, email, isEmailVerified: form.get('verified') === 'on' };
    this.#goBack(asking, form.get('answer') === 'allow' ? person : null, response);
  }

  #goBack(asking: Asking, person: StandInPerson | null, response: ServerResponse): void {
    const back = new URL(asking.redirectUri);
    if (person === null) {
      back.searchParams.set('error', 'access_denied');
    } else {
      const code = randomBytes(24).toString('base64url');
      this.#grants.set(code, { ...asking, person, until: Date.now() + CODE_LIVES_MS });
      back.searchParams.set('code', code);
    }
    back.searchParams.set('state', asking.state);
    response.writeHead(302, { Location: back.toString() }).end();
  }

  /** Changes a code for a token, once. */
  #token(form: URLSearchParams, response: ServerResponse): void {
    const grant = this.#grants.get(form.get('code') ?? '');
    this.#grants.delete(form.get('code') ?? '');
    const challenge = createHash('sha256')
      .update(form.get('code_verifier') ?? '')
      .digest('base64url');
    const isSound =
      form.get('grant_type') === 'authorization_code' &&
      form.get('client_id') === this.settings.clientId &&
      form.get('client_secret') === this.settings.clientSecret &&
      grant?.redirectUri === form.get('redirect_uri') &&
      grant?.challenge === challenge &&
      grant.until > Date.now();
    if (!grant || !isSound) return send(response, 400, { error: 'invalid_grant' });
    const token = randomBytes(24).toString('base64url');
    this.#tokens.set(token, grant.person);
    send(response, 200, { access_token: token, token_type: 'Bearer', expires_in: 3600 });
  }

  #particulars(authorization: string, response: ServerResponse): void {
    const person = this.#tokens.get(authorization.replace(/^Bearer /, ''));
    if (!person) return send(response, 401, { error: 'invalid_token' });
    const { subject, name, email, isEmailVerified } = person;
    send(response, 200, { sub: subject, name, email, email_verified: isEmailVerified });
  }
}

function page(id: string): string {
  return `<!doctype html><html lang="en"><meta charset="utf-8"><title>Stand-in for Google</title>
<h1>Stand-in for Google</h1>
<p>For development: whoever you name here is who you are.</p>
<form method="post" action="/consent">
<input type="hidden" name="id" value="${id}">
<p><label>E-mail <input name="email" type="email" required autofocus></label></p>
<p><label><input name="verified" type="checkbox" checked> The address is verified</label></p>
<p><button name="answer" value="allow">Allow</button> <button name="answer" value="deny" formnovalidate>Deny</button></p>
</form></html>`;
}

function send(response: ServerResponse, status: number, body: object): void {
  response.writeHead(status, { 'Content-Type': 'application/json' }).end(JSON.stringify(body));
}

function portOf(server: Server): number {
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('The stand-in does not listen on a port.');
  return address.port;
}

function closeServer(server: Server): Promise<void> {
  return new Promise((resolve, reject) => {
    server.close((error) => (error ? reject(error) : resolve()));
    server.closeAllConnections();
  });
}
