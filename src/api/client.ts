import type { z } from 'zod';

import type { BodyInputOf, EndpointContract, ParamsOf, ReplyOf } from '../contract/endpoint';
import { errorReply, type ErrorReply } from '../contract/errors';

type FieldError = NonNullable<ErrorReply['error']['fields']>[number];

/** A refusal of the server, or its silence. `message` is a sentence for the person. */
export class ApiError extends Error {
  constructor(
    readonly code: string,
    message: string,
    readonly status: number,
    readonly fields: FieldError[] = [],
  ) {
    super(message);
    this.name = 'ApiError';
  }
}

/** An empty object schema infers as a record that holds nothing. */
type IsEmpty<T> = string extends keyof T ? true : keyof T extends never ? true : false;

type Input<E extends EndpointContract> = (IsEmpty<ParamsOf<E>> extends true
  ? { params?: undefined }
  : { params: ParamsOf<E> }) &
  (IsEmpty<z.input<E['body']>> extends true ? { body?: undefined } : { body: BodyInputOf<E> }) & {
    signal?: AbortSignal;
  };

/** Asks the server as the contract says, and lets nothing through that does not follow it. */
export async function callEndpoint<E extends EndpointContract>(
  endpoint: E,
  input: Input<E>,
): Promise<ReplyOf<E>> {
  const { params, body, signal } = input;
  const path = pathOf(endpoint, (params ?? {}) as Record<string, string>);
  const json = await ask(endpoint.method, path, endpoint.method === 'GET' ? undefined : (body ?? {}), signal);
  const reply = endpoint.reply.safeParse(json);
  if (reply.success) return reply.data as ReplyOf<E>;
  console.error(`${endpoint.id} answered something else than agreed`, reply.error);
  throw new ApiError(
    'UNEXPECTED_REPLY',
    'The server answered in a way this page does not understand. Reload the page to get its newest version.',
    200,
  );
}

/** Fills `:name` in a path of the contract. */
export function pathOf(endpoint: EndpointContract, params: Record<string, string>): string {
  return endpoint.path.replace(/:(\w+)/g, (_match, name: string) => {
    const value = params[name];
    if (value === undefined) throw new Error(`${endpoint.id} needs ${name}`);
    return encodeURIComponent(value);
  });
}

/** Opens a session; it lives in a cookie that scripts cannot read. */
export const openSession = (credentials: { email: string; password: string }) =>
  ask('POST', '/api/auth/sign-in/email', credentials);

export const closeSession = () => ask('POST', '/api/auth/sign-out', {});

async function ask(method: string, path: string, body?: unknown, signal?: AbortSignal): Promise<unknown> {
  const response = await fetch(path, {
    method,
    signal,
    credentials: 'same-origin',
    headers: body === undefined ? {} : { 'Content-Type': 'application/json' },
    body: body === undefined ? undefined : JSON.stringify(body),
  }).catch((error: unknown) => {
    if (signal?.aborted) throw error;
    throw new ApiError(
      'OFFLINE',
      'The server does not answer. Nothing was lost: check the connection and try again.',
      0,
    );
  });
  const json: unknown = await response.json().catch((error: unknown) => {
    // A question that nobody waits for any more is not an answer that makes no sense.
    if (signal?.aborted) throw error;
    return null;
  });
  if (response.ok) return json;
  throw refusal(response.status, json);
}

function refusal(status: number, json: unknown): ApiError {
  const parsed = errorReply.safeParse(json);
  if (!parsed.success) {
    const message = 'The server could not answer. Nothing was lost: try again in a moment.';
    return new ApiError('INTERNAL', message, status);
  }
  const { code, message, fields } = parsed.data.error;
  return new ApiError(code, message, status, fields);
}
