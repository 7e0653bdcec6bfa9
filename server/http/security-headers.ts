import type { RequestHandler } from 'express';
import helmet from 'helmet';

import type { Config } from '../config';

/**
 * The application may load only what this server gives it. Inline styles stay allowed: the layout engine
 * of the client writes its rules into a style element. Scripts have to be files.
 */
export function securityHeaders(config: Config): RequestHandler {
  const encrypted = config.publicUrl.startsWith('https:');
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'", 'data:'],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        ...(encrypted ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    // These three mean something only over TLS; over plain HTTP browsers warn about them or lock people out.
    strictTransportSecurity: encrypted,
    crossOriginOpenerPolicy: encrypted,
    originAgentCluster: encrypted,
    frameguard: { action: 'deny' },
  });
}
