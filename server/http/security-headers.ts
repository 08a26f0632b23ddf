import type { RequestHandler } from 'express';
import helmet from 'helmet';

/**
 * A content security policy that lets the page load nothing but its own. Styles may be inline because the component library
 * adds style elements; scripts may not. Over plain HTTP (a studio's own machine) nothing is upgraded and HSTS is left out.
 */
export function securityHeaders(publicUrl: string | null): RequestHandler {
  const overTls = publicUrl?.startsWith('https:') ?? false;
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        workerSrc: ["'self'"],
        manifestSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        ...(overTls && { upgradeInsecureRequests: [] }),
      },
    },
    strictTransportSecurity: overTls ? { maxAge: 31_536_000 } : false,
    // The links that leave are none of another site's business.
    referrerPolicy: { policy: 'same-origin' },
  });
}
