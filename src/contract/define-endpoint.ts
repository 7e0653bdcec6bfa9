import { z } from 'zod';

import type { EndpointContract } from './endpoint';

const nothing = z.object({});

type Defined<
  Params extends z.ZodType | undefined,
  Query extends z.ZodType | undefined,
  Body extends z.ZodType | undefined,
  Reply extends z.ZodType,
> = EndpointContract<
  Params extends z.ZodType ? Params : typeof nothing,
  Query extends z.ZodType ? Query : typeof nothing,
  Body extends z.ZodType ? Body : typeof nothing,
  Reply
>;

/** Fills in what an endpoint does not use, so that both ends can rely on every part being there. */
export function defineEndpoint<
  Reply extends z.ZodType,
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(endpoint: {
  id: string;
  method: EndpointContract['method'];
  path: string;
  summary: string;
  access: EndpointContract['access'];
  params?: Params;
  query?: Query;
  body?: Body;
  reply: Reply;
  status?: EndpointContract['status'];
  errors?: readonly string[];
  produces?: EndpointContract['produces'];
}): Defined<Params, Query, Body, Reply> {
  return {
    status: 200,
    errors: [],
    produces: 'json',
    ...endpoint,
    params: endpoint.params ?? nothing,
    query: endpoint.query ?? nothing,
    body: endpoint.body ?? nothing,
  } as Defined<Params, Query, Body, Reply>;
}
