import { z } from 'zod';

import { endpoints } from '../../src/contract/index';
import type { EndpointContract } from '../../src/contract/endpoint';
import { COMMON_ERRORS, errorReply } from '../../src/contract/errors';

type Json = Record<string, unknown>;

/** The interface as an OpenAPI 3.1 document, made from the schemas that both ends run on. */
export function openApiDocument(version: string): { openapi: string; paths: Json } & Json {
  const paths: Record<string, Json> = {};
  for (const contract of Object.values(endpoints) as EndpointContract[]) {
    const path = contract.path.replaceAll(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [contract.method.toLowerCase()]: operation(contract) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Stillfield',
      version,
      description:
        'Weekly rate planning for geothermal fields. Times are UTC milliseconds, quantities are SI. ' +
        'A plan supports a decision; it does not replace a permit, its protocol or licensed judgement.',
    },
    paths,
    components: {
      schemas: { Error: jsonSchema(errorReply, 'output') },
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'stillfield.session_token' },
      },
    },
  };
}

function operation(contract: EndpointContract): Json {
  const reads = contract.method === 'GET';
  return {
    operationId: contract.id,
    summary: contract.summary,
    security: contract.access === 'public' ? [] : [{ session: [] }],
    parameters: [...parameters(contract.params, 'path'), ...parameters(contract.query, 'query')],
    ...(reads || isEmpty(contract.body)
      ? {}
      : { requestBody: { required: true, content: json(jsonSchema(contract.body, 'input')) } }),
    responses: {
      [contract.status]: {
        description: 'Success',
        content:
          contract.produces === 'eventStream'
            ? { 'text/event-stream': { schema: jsonSchema(contract.reply, 'output') } }
            : json(jsonSchema(contract.reply, 'output')),
      },
      default: { description: refusals(contract), content: json({ $ref: '#/components/schemas/Error' }) },
    },
  };
}

function refusals(contract: EndpointContract): string {
  const common = Object.entries(COMMON_ERRORS)
    .filter(([code]) => contract.access !== 'public' || code !== 'NOT_SIGNED_IN')
    .map(([code, status]) => `${code} (${status})`);
  return `A refusal: ${[...common, ...contract.errors].join(', ')}`;
}

function parameters(schema: z.ZodType, where: 'path' | 'query'): Json[] {
  const { properties = {}, required = [] } = jsonSchema(schema, 'input') as {
    properties?: Record<string, Json>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || required.includes(name),
    schema: property,
  }));
}

const isEmpty = (schema: z.ZodType) =>
  Object.keys((jsonSchema(schema, 'input') as { properties?: Json }).properties ?? {}).length === 0;

const json = (schema: Json): Json => ({ 'application/json': { schema } });

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io }) as Json;
  return rest;
}
