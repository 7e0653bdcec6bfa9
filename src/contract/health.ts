import { z } from 'zod';

import { defineEndpoint } from './define-endpoint';

export const getHealth = defineEndpoint({
  id: 'getHealth',
  method: 'GET',
  path: '/api/health',
  summary: 'Version, database and queue state',
  access: 'public',
  reply: z.object({
    status: z.enum(['ok', 'degraded']),
    version: z.string(),
    modelVersion: z.string(),
    database: z.object({ ok: z.boolean(), migration: z.string().nullable() }),
    queue: z.object({ running: z.number().int(), waiting: z.number().int() }),
  }),
});

/** The OpenAPI 3.1 document generated from these contracts. */
export const getOpenApi = defineEndpoint({
  id: 'getOpenApi',
  method: 'GET',
  path: '/api/openapi.json',
  summary: 'This interface as an OpenAPI document',
  access: 'public',
  reply: z.looseObject({ openapi: z.string(), paths: z.looseObject({}) }),
});
