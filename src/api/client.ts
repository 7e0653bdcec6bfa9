import type { z } from 'zod';

import { errorReply } from '../contract/errors';
import type { BodyInputOf, EndpointContract, ParamsOf, QueryOf, ReplyOf } from '../contract/endpoint';

/** A refusal or failure as a person can be told: what happened, and which fields it is about. */
export class ApiError extends Error {
  constructor(
    readonly code: string,
    message: string,
    readonly status: number,
    readonly fields: { path: string; message: string }[] = [],
  ) {
    super(message);
    this.name = 'ApiError';
  }
}

const NO_CONNECTION = 'The server cannot be reached. Nothing was changed; try again when you are connected.';
const NOT_UNDERSTOOD =
  'The server answered in a way this page does not understand. Reload it to get the newest version.';

export interface CallOptions<E extends EndpointContract> {
  params?: ParamsOf<E>;
  query?: QueryOf<E>;
  body?: BodyInputOf<E>;
  signal?: AbortSignal;
}

/** Calls an endpoint of the contract; the reply has been parsed against it. Throws ApiError. */
export async function callEndpoint<E extends EndpointContract>(
  endpoint: E,
  options: CallOptions<E> = {},
): Promise<ReplyOf<E>> {
  const isRead = endpoint.method === 'GET';
  const json = await request(endpointUrl(endpoint, options), {
    method: endpoint.method,
    body: isRead ? undefined : JSON.stringify(options.body ?? {}),
    signal: options.signal,
  });
  const parsed = (endpoint.reply as z.ZodType<ReplyOf<E>>).safeParse(json);
  if (!parsed.success) throw new ApiError('NOT_UNDERSTOOD', NOT_UNDERSTOOD, 0);
  return parsed.data;
}

/** The address of an endpoint with its parameters filled in. */
export function endpointUrl<E extends EndpointContract>(
  endpoint: E,
  { params, query }: Pick<CallOptions<E>, 'params' | 'query'>,
): string {
  const values = (params ?? {}) as Record<string, string>;
  const path = endpoint.path.replace(/:(\w+)/g, (_whole, name: string) =>
    encodeURIComponent(values[name] ?? ''),
  );
  const search = new URLSearchParams(
    Object.entries((query ?? {}) as Record<string, unknown>)
      .filter(([, value]) => value !== undefined)
      .map(([name, value]) => [name, String(value)]),
  ).toString();
  return search ? `${path}?${search}` : path;
}

/** Sign-in and sign-out belong to the session's own library and not to the contract. */
export async function signIn(email: string, password: string): Promise<void> {
  await request('/api/auth/sign-in/email', { method: 'POST', body: JSON.stringify({ email, password }) });
}

export async function signOut(): Promise<void> {
  await request('/api/auth/sign-out', { method: 'POST', body: '{}' });
}

async function request(url: string, init: RequestInit): Promise<unknown> {
  let response: Response;
  try {
    response = await fetch(url, {
      ...init,
      credentials: 'same-origin',
      headers: { Accept: 'application/json', ...(init.body ? { 'Content-Type': 'application/json' } : {}) },
    });
  } catch (error) {
    if (init.signal?.aborted) throw error;
    throw new ApiError('NO_CONNECTION', NO_CONNECTION, 0);
  }
  const json: unknown = await response.json().catch(() => null);
  if (response.ok) return json;
  const refusal = errorReply.safeParse(json);
  if (!refusal.success) throw new ApiError('NOT_UNDERSTOOD', NOT_UNDERSTOOD, response.status);
  const { code, message, fields } = refusal.data.error;
  throw new ApiError(code, message, response.status, fields);
}
