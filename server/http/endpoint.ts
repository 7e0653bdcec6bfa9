import type { Request, Response } from 'express';
import type { z } from 'zod';

import { rolesIn } from '../../db/store/people';
import type { BodyOf, EndpointContract, ParamsOf, QueryOf, ReplyOf } from '../../src/contract/endpoint';
import type { Role } from '../../src/contract/enums';
import type { Context } from '../context';
import { badRequest, notAllowed, notFound, notSignedIn } from '../errors';
import type { Decision } from './decision';
import { openEventStream, type EventStream } from './events';
import { readSession, type Actor } from './session';

/** A signed-in person inside one field. */
export interface Member extends Actor {
  readonly fieldId: string;
  readonly roles: readonly Role[];
}

interface Ask<E extends EndpointContract, Who> {
  context: Context;
  who: Who;
  /** What a returning event source saw last. */
  lastEventId: string | null;
  params: ParamsOf<E>;
  query: QueryOf<E>;
  body: BodyOf<E>;
}

/** Load, authorise, act: what a feature says about one of its endpoints. */
interface Parts<E extends EndpointContract, Who, Subject, Answer> {
  load: (ask: Ask<E, Who>) => Subject;
  policy: (who: Who, subject: Subject) => Decision;
  act: (ask: Ask<E, Who> & { subject: Subject }) => Answer | Promise<Answer>;
}

export interface BoundEndpoint {
  readonly contract: EndpointContract;
  readonly hasPolicy: boolean;
  answer(context: Context, req: Request, res: Response): Promise<void>;
}

/** For anybody, signed in or not. */
export function publicEndpoint<E extends EndpointContract, Subject>(
  contract: E,
  parts: Parts<E, null, Subject, z.input<E['reply']>>,
): BoundEndpoint {
  return bind(contract, 'public', () => null, parts, sendReply);
}

/** For anybody who has signed in. */
export function personEndpoint<E extends EndpointContract, Subject>(
  contract: E,
  parts: Parts<E, Actor, Subject, z.input<E['reply']>>,
): BoundEndpoint {
  return bind(contract, 'signedIn', (_context, actor) => actor!, parts, sendReply);
}

/** For members of the field in the path; to all others the field does not exist. */
export function memberEndpoint<E extends EndpointContract, Subject>(
  contract: E,
  parts: Parts<E, Member, Subject, z.input<E['reply']>>,
): BoundEndpoint {
  return bind(contract, 'member', asMember, parts, sendReply);
}

/**
 * The same for a stream of events: `act` gives a function that feeds it, or null where the client has
 * seen everything. An event source takes the empty answer as the sign to stop asking again.
 */
export function memberEventStream<E extends EndpointContract, Subject>(
  contract: E,
  parts: Parts<E, Member, Subject, ((stream: EventStream<ReplyOf<E>>) => void) | null>,
): BoundEndpoint {
  return bind(contract, 'member', asMember, parts, (feed, { res }) => {
    if (!feed) res.status(204).end();
    else feed(openEventStream(res, (value) => contract.reply.parse(value) as ReplyOf<E>));
  });
}

function bind<E extends EndpointContract, Who, Subject, Answer>(
  contract: E,
  access: EndpointContract['access'],
  identify: (context: Context, actor: Actor | null, params: ParamsOf<E>) => Who,
  parts: Parts<E, Who, Subject, Answer>,
  send: (answer: Answer, http: { contract: E; res: Response }) => void,
): BoundEndpoint {
  if (contract.access !== access) throw new Error(`${contract.id} is for ${contract.access}, not ${access}`);
  return {
    contract,
    hasPolicy: typeof parts.policy === 'function',
    async answer(context, req, res) {
      const actor = access === 'public' ? null : await readSession(context, req, res);
      if (access !== 'public' && !actor) throw notSignedIn();
      const asked = {
        params: valid(contract.params, req.params, 'params') as ParamsOf<E>,
        query: valid(contract.query, req.query, 'query') as QueryOf<E>,
        body: valid(contract.body, req.body ?? {}, '') as BodyOf<E>,
      };
      const lastEventId = req.get('Last-Event-ID') ?? null;
      const ask = { context, lastEventId, ...asked, who: identify(context, actor, asked.params) };
      const subject = parts.load(ask);
      const decision = parts.policy(ask.who, subject);
      if (!decision.allowed) throw notAllowed(decision.reason);
      send(await parts.act({ ...ask, subject }), { contract, res });
    },
  };
}

function asMember(context: Context, actor: Actor | null, params: unknown): Member {
  const { fieldId } = params as { fieldId: string };
  const roles = rolesIn(context.database.db, fieldId, actor!.id);
  if (roles.length === 0) throw notFound('The field');
  return { ...actor!, fieldId, roles };
}

function sendReply<E extends EndpointContract>(
  answer: z.input<E['reply']>,
  { contract, res }: { contract: E; res: Response },
): void {
  // Parsing the reply keeps anything that the contract does not name from leaving by mistake.
  const reply = contract.reply.parse(answer);
  res.status(contract.status).setHeader('Cache-Control', 'no-store').json(reply);
}

function valid(schema: z.ZodType, value: unknown, prefix: string): unknown {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const fields = parsed.error.issues.map((issue) => ({
    path: [prefix, ...issue.path.map(String)].filter((part) => part !== '').join('.'),
    message: issue.message,
  }));
  throw badRequest('Some of what was sent cannot be used.', fields);
}
