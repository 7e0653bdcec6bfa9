import type { ErrorRequestHandler } from 'express';

import type { ErrorReply } from '../../src/contract/errors';
import type { Context } from '../context';
import { AppError, badRequest } from '../errors';

/** Every refusal leaves through here, in one shape. */
export function onError(context: Context): ErrorRequestHandler {
  return (error, req, res, next) => {
    const refusal = asAppError(error);
    const entry = { code: refusal.code, method: req.method, path: req.path };
    if (refusal.status >= 500) context.log.error({ ...entry, err: error }, refusal.message);
    else context.log.debug(entry, refusal.message);
    // The reply is under way: all that is left is to cut it off.
    if (res.headersSent) return next(error);
    const reply: ErrorReply = {
      error: { code: refusal.code, message: refusal.sentence, fields: refusal.more.fields },
    };
    res.status(refusal.status).setHeader('Cache-Control', 'no-store').json(reply);
  };
}

function asAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  const { type, status } = (error ?? {}) as { type?: string; status?: number };
  if (type === 'entity.parse.failed') return badRequest('The request is not valid JSON.');
  if (type === 'entity.too.large') return new AppError('BAD_REQUEST', 413, 'The request is too large.');
  if (status !== undefined && status >= 400 && status < 500) return badRequest('The request cannot be read.');
  const log = error instanceof Error ? error.message : String(error);
  return new AppError('INTERNAL', 500, 'Something went wrong on the server. It has been written down.', {
    log,
  });
}
