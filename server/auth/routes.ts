import { fromNodeHeaders } from 'better-auth/node';
import { Router, type Request, type Response } from 'express';

import type { Context } from '../context';
import { AppError, notFound } from '../errors';
import { limitSignIn } from '../http/rate-limit';

/** Of everything the sign-in library offers, what this product uses. */
const OFFERED = ['POST /sign-in/email', 'POST /sign-out'];

export function authRoutes(context: Context): Router {
  const router = Router();
  router.post('/sign-in/email', ...limitSignIn());
  router.all('/*splat', async (req, res) => {
    if (!OFFERED.includes(`${req.method} ${req.path}`)) throw notFound('This address');
    await answer(context, req, res);
  });
  return router;
}

async function answer(context: Context, req: Request, res: Response): Promise<void> {
  const headers = fromNodeHeaders(req.headers);
  headers.delete('content-length');
  const reply = await context.auth.handler(
    new Request(new URL(req.originalUrl, context.config.publicUrl), {
      method: req.method,
      headers,
      body: JSON.stringify(req.body ?? {}),
    }),
  );
  if (!reply.ok) throw await refusal(reply);
  res.status(reply.status);
  res.setHeader('Cache-Control', 'no-store');
  for (const cookie of reply.headers.getSetCookie()) res.appendHeader('Set-Cookie', cookie);
  // The library repeats the session's token in its answer; it belongs in the cookie alone.
  res.json({ ok: true });
}

/** The library's refusals in the shape and the words of all others. */
async function refusal(reply: globalThis.Response): Promise<AppError> {
  const { code, message } = (await reply.json().catch(() => ({}))) as { code?: string; message?: string };
  const log = message ?? `sign-in answered ${reply.status}`;
  if (reply.status === 401) {
    return new AppError('WRONG_SIGN_IN', 401, 'E-mail or password is not right.', { log });
  }
  if (reply.status === 403) {
    return new AppError('NOT_ALLOWED', 403, 'This request came from another site.', { log });
  }
  if (reply.status < 500) {
    return new AppError('BAD_REQUEST', 422, 'Give an e-mail address and a password.', { log });
  }
  return new AppError('INTERNAL', 500, 'Sign-in does not work at the moment.', { log: code ?? log });
}
