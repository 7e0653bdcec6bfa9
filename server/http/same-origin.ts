import type { RequestHandler } from 'express';

import { trustedOrigins } from '../auth/auth';
import type { Context } from '../context';
import { AppError } from '../errors';

const READING = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Browsers name the page that asks; one of another site may not change anything here, cookie or not.
 * Programs without a browser send no Origin, and hold no session that somebody else could borrow.
 */
export function sameOrigin(context: Context): RequestHandler {
  return (req, _res, next) => {
    const origin = req.headers.origin;
    const foreignOrigin =
      origin !== undefined && !trustedOrigins(context.config, req.headers.host ?? null).includes(origin);
    const foreignSite = req.headers['sec-fetch-site'] === 'cross-site';
    if (READING.includes(req.method) || (!foreignOrigin && !foreignSite)) return next();
    next(
      new AppError('NOT_ALLOWED', 403, 'This request came from another site.', {
        log: `refused a request from origin ${origin}`,
      }),
    );
  };
}
