import { expect, test } from 'vitest';

import { boundEndpoints } from '../../server/endpoints';
import { endpoints } from '../../src/contract/index';
import type { EndpointContract } from '../../src/contract/endpoint';

const all = Object.entries(endpoints) as [string, EndpointContract][];
const keysOf = (schema: unknown) => Object.keys((schema as { shape: object }).shape).sort();

test('an endpoint is listed under its own id', () => {
  expect(all.filter(([key, contract]) => contract.id !== key)).toEqual([]);
});

test('no two endpoints share a method and a path', () => {
  const addresses = all.map(([, { method, path }]) => `${method} ${path}`);
  expect(addresses).toHaveLength(new Set(addresses).size);
});

test.each(all)('%s names the parameters of its path', (_id, { path, params }) => {
  const inPath = [...path.matchAll(/:(\w+)/g)].map(([, name]) => name!).sort();
  expect(keysOf(params)).toEqual(inPath);
});

test.each(all.filter(([, { access }]) => access === 'member'))('%s lies inside a field', (_id, { path }) => {
  expect(path).toMatch(/^\/api\/fields\/:fieldId(\/|$)/);
});

test.each(all.filter(([, { method }]) => method === 'GET'))(
  '%s reads, so it has no body',
  (_id, { body }) => {
    expect(keysOf(body)).toEqual([]);
  },
);

test('every endpoint is bound to what answers it', () => {
  expect(Object.keys(boundEndpoints).sort()).toEqual(Object.keys(endpoints).sort());
  for (const [id, contract] of all)
    expect(boundEndpoints[id as keyof typeof endpoints].contract).toBe(contract);
});

test.each(Object.entries(boundEndpoints))('%s has a policy', (_id, { hasPolicy }) => {
  expect(hasPolicy).toBe(true);
});
