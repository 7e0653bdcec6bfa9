import { expect, test } from 'vitest';

import { openApiDocument } from '../../server/http/open-api';
import type { EndpointContract } from '../../src/contract/endpoint';
import { endpoints } from '../../src/contract/index';

const document = openApiDocument('9.9.9');
const all = Object.values(endpoints) as EndpointContract[];
const operationOf = ({ path, method }: EndpointContract): any =>
  (document.paths as any)[path.replaceAll(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()];

test('the document keeps its own contract', () => {
  expect(endpoints.getOpenApi.reply.safeParse(document).success).toBe(true);
  expect(document.info).toMatchObject({ title: 'Stillfield', version: '9.9.9' });
});

test('it holds every endpoint and nothing else', () => {
  const operations = Object.values(document.paths).flatMap((path) => Object.values(path as object));
  expect(operations.map(({ operationId }) => operationId).sort()).toEqual(all.map(({ id }) => id).sort());
});

test.each(all.map((contract) => [contract.id, contract] as const))(
  '%s: parameters, success and refusals',
  (_id, contract) => {
    const operation = operationOf(contract);
    const inPath = operation.parameters.filter((parameter: any) => parameter.in === 'path');
    expect(inPath.map((parameter: any) => `:${parameter.name}`)).toEqual(contract.path.match(/:\w+/g) ?? []);
    expect(operation.responses).toHaveProperty(String(contract.status));
    for (const code of contract.errors) expect(operation.responses.default.description).toContain(code);
    expect(operation.security).toEqual(contract.access === 'public' ? [] : [{ session: [] }]);
  },
);

test('a body is described where one is asked for, with the limits it is held to', () => {
  const schema = operationOf(endpoints.buildPlan).requestBody.content['application/json'].schema;
  expect(schema.required).toContain('heatTargetJPerWeek');
  expect(schema.required).not.toContain('notes');
  expect(schema.properties.weeks).toMatchObject({ type: 'integer', minimum: 1, maximum: 26 });
  expect(operationOf(endpoints.cancelJob)).not.toHaveProperty('requestBody');
});

test('a stream of events is described as one', () => {
  expect(operationOf(endpoints.watchJob).responses['200'].content).toHaveProperty('text/event-stream');
});
