import type { z } from 'zod';

export type HttpMethod = 'GET' | 'POST' | 'PATCH' | 'DELETE';

/** Who may call at all; what a member may do beyond that is the server's policy. */
export type Access = 'public' | 'signedIn' | 'member';

/**
 * One endpoint, told once for both ends: the server binds it, the client calls it and the OpenAPI
 * document is generated from it. Paths use Express notation (`/api/fields/:fieldId`).
 */
export interface EndpointContract<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Reply extends z.ZodType = z.ZodType,
> {
  readonly id: string;
  readonly method: HttpMethod;
  readonly path: string;
  readonly summary: string;
  readonly access: Access;
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly reply: Reply;
  /** The status of a success. */
  readonly status: 200 | 201 | 202 | 204;
  /** Error codes beyond the common ones (see `errors.ts`). */
  readonly errors: readonly string[];
  /** `json` unless the reply is a stream or a file. */
  readonly produces: 'json' | 'eventStream';
}

export type ParamsOf<E extends EndpointContract> = z.output<E['params']>;
export type QueryOf<E extends EndpointContract> = z.output<E['query']>;
export type BodyOf<E extends EndpointContract> = z.output<E['body']>;
/** What a caller may write, before defaults are filled in. */
export type BodyInputOf<E extends EndpointContract> = z.input<E['body']>;
export type ReplyOf<E extends EndpointContract> = z.output<E['reply']>;
