import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';

import { AppError } from '../errors';

const MINUTE_MS = 60_000;

function limiter(options: {
  windowMs: number;
  limit: number;
  key: (req: Request) => string;
  sentence: string;
  failuresOnly?: boolean;
}): RequestHandler {
  return rateLimit({
    windowMs: options.windowMs,
    limit: options.limit,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    skipSuccessfulRequests: options.failuresOnly ?? false,
    keyGenerator: options.key,
    handler: (_req, _res, next) => next(new AppError('TOO_MANY_REQUESTS', 429, options.sentence)),
  });
}

const byAddress = (req: Request) => ipKeyGenerator(req.ip ?? '');

/** Failed attempts only, per address and per account: guessing gets slow, working does not. */
export function limitSignIn(): RequestHandler[] {
  const sentence = 'Too many failed attempts to sign in. Try again in a quarter of an hour.';
  const windowMs = 15 * MINUTE_MS;
  const account = (req: Request) => String(req.body?.email ?? '').toLowerCase();
  return [
    limiter({ windowMs, limit: 40, key: byAddress, sentence, failuresOnly: true }),
    limiter({ windowMs, limit: 10, key: account, sentence, failuresOnly: true }),
  ];
}

export function limitApi(): RequestHandler {
  return limiter({
    windowMs: MINUTE_MS,
    limit: 1200,
    key: byAddress,
    sentence: 'Too many requests from this address. Wait a minute.',
  });
}
