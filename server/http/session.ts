import { fromNodeHeaders } from 'better-auth/node';
import type { Request, Response } from 'express';

import type { Context } from '../context';

/** A signed-in person. */
export interface Actor {
  readonly id: string;
  readonly name: string;
  readonly email: string;
}

/** Who asks, or null. Passes on the cookie that a prolonged session comes with. */
export async function readSession(context: Context, req: Request, res: Response): Promise<Actor | null> {
  if (!req.headers.cookie) return null;
  const { response, headers } = await context.auth.api.getSession({
    headers: fromNodeHeaders(req.headers),
    returnHeaders: true,
  });
  for (const cookie of headers.getSetCookie()) res.appendHeader('Set-Cookie', cookie);
  if (!response) return null;
  const { id, name, email } = response.user;
  return { id, name, email };
}
