import type { Router } from 'express';
import { z } from 'zod';
import { bodyOf } from './body-of';
import { withStudio } from './studio';

interface Layer {
  readonly route?: { readonly path: string; readonly methods: Readonly<Record<string, boolean>> };
  readonly handle?: Partial<Router>;
}

/** Every address that the application answers by a method of its own, as OpenAPI writes it. */
function mountedRoutes(router: Partial<Router>): readonly string[] {
  return (router.stack as readonly Layer[]).flatMap(({ route, handle }) => {
    if (!route) return handle?.stack ? mountedRoutes(handle) : [];
    const path = route.path.replace(/:(\w+)/g, '{$1}');
    // What answers every method only says which are answered.
    const methods = Object.keys(route.methods).filter((method) => method !== '_all');
    return methods.map((method) => `${method} ${path}`);
  });
}

describe('the description of the API', () => {
  const studio = withStudio();

  it('tells what is mounted, all of it, and nothing else', async () => {
    const Paths = z.object({ paths: z.record(z.string(), z.record(z.string(), z.unknown())) });
    const { paths } = bodyOf(Paths, await studio.visitor().get('/api/openapi.json'));
    const told = Object.entries(paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method} ${path}`),
    );
    const mounted = mountedRoutes(studio.running.app.router).filter((route) => route.includes(' /api/'));
    expect(mounted.length).toBeGreaterThan(70);
    expect([...told].sort()).toEqual([...new Set(mounted)].sort());
  });

  it('can be read as a page under the policy that forbids scripts', async () => {
    const page = await studio.visitor().get('/api/docs');
    expect([page.status, page.headers.get('content-type')]).toEqual([200, 'text/html; charset=utf-8']);
    expect(page.headers.get('content-security-policy')).toContain("script-src 'self'");
    expect(page.body).toContain('/api/feeds');
    const style = await studio.visitor().get('/api/docs/style.css');
    expect([style.status, style.headers.get('content-type')]).toEqual([200, 'text/css; charset=utf-8']);
  });
});

describe('the headers of every answer', () => {
  const studio = withStudio();

  // Source: OWASP HTTP Headers Cheat Sheet for which there should be; CSP Level 3 for the policy's directives.
  it.each(['/api/session', '/api/docs', '/api/health', '/api/nothing', '/plan', '/api/calendar/x.ics'])(
    'keep %s from being framed, sniffed and scripted',
    async (path) => {
      const { headers } = await studio.visitor().get(path);
      const policy = new Map(
        (headers.get('content-security-policy') ?? '').split(';').map((directive) => {
          const [name, ...sources] = directive.trim().split(' ');
          return [name, sources.join(' ')];
        }),
      );
      expect(policy.get('default-src')).toBe("'self'");
      expect(policy.get('script-src')).toBe("'self'");
      expect(policy.get('script-src-attr')).toBe("'none'");
      expect(policy.get('object-src')).toBe("'none'");
      expect(policy.get('base-uri')).toBe("'self'");
      expect(policy.get('form-action')).toBe("'self'");
      expect(policy.get('frame-ancestors')).toBe("'none'");
      expect([...policy.values()].join(' ')).not.toMatch(/unsafe-eval|https?:|\*/);
      expect(headers.get('x-content-type-options')).toBe('nosniff');
      expect(headers.get('referrer-policy')).toBe('same-origin');
      expect(headers.get('x-powered-by')).toBeNull();
      expect(headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
    },
  );

  it('keep what was signed in for out of caches', async () => {
    const owner = await studio.as('owner');
    expect((await owner.get('/api/accounts')).headers.get('cache-control')).toBe('no-store');
  });
});
