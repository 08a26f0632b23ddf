import type { Request, Response, Router } from 'express';
import type { Store } from 'express-session';
import type { LiveEvent } from '@common/contract';
import { Problem } from '../http/problem';
import { isOffice, type Actor } from '../session/actor';
import type { LiveHub } from './live-hub';

const HEARTBEAT_MS = 20_000;

/** Records of which a client's page shows something. */
const ON_CLIENT_PAGE = new Set(['production', 'key-date', 'piece', 'stage']);

/** Server-sent events (WHATWG HTML, section 9.2) for the open pages of those who are signed in. */
export function mountLive(router: Router, hub: LiveHub, sessions: Store, heartbeatMs: number = HEARTBEAT_MS): void {
  router.get('/api/live', (request: Request, response: Response) => {
    const actor = request.user;
    if (!actor) throw new Problem('not-signed-in', 'Sign in to go on.');
    response.status(200).set({
      'Content-Type': 'text/event-stream',
      'Cache-Control': 'no-store',
      // Proxies that buffer would hold every event back.
      'X-Accel-Buffering': 'no',
    });
    response.flushHeaders();
    response.write('retry: 2000\n\n');
    const stopListening = hub.listen((event) => {
      const seen = whatIsSeenBy(actor, event);
      if (seen) response.write(`data: ${JSON.stringify(seen)}\n\n`);
    });
    // A page that reconnects reads everything anew; so after a gap we let it.
    const stopGaps = hub.onGap(() => response.end());
    const heartbeat = setInterval(() => {
      sessions.get(request.sessionID, (error: unknown, session) => {
        if (error || isOf(session, actor)) response.write(': here\n\n');
        else response.end();
      });
    }, heartbeatMs);
    response.once('close', () => {
      clearInterval(heartbeat);
      stopListening();
      stopGaps();
    });
  });
}

/** The part of an event that somebody may know: the office all, makers what was issued, clients only that their page changed. */
export function whatIsSeenBy(actor: Actor, event: LiveEvent): LiveEvent | null {
  if (isOffice(actor) || event.kind === 'plan-issued') return event;
  if (event.kind !== 'record-changed') return null;
  if (actor.role === 'maker') return event.subject === 'account' ? null : event;
  return ON_CLIENT_PAGE.has(event.subject) ? { kind: 'record-changed', subject: 'client-page', id: null } : null;
}

function isOf(session: unknown, actor: Actor): boolean {
  const user = (session as { passport?: { user?: unknown } } | null | undefined)?.passport?.user;
  return user === actor.accountId;
}
