import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import type { EndpointContract } from '../../src/contract/endpoint';
import { endpoints } from '../../src/contract/index';
import { errorReply } from '../../src/contract/errors';
import { addPerson } from '../support/extra-people';
import { planRequest, requestPlan } from '../support/plan-requests';
import { startTestServer, type Caller, type Reply, type TestServer } from '../support/test-server';

const all = Object.values(endpoints) as EndpointContract[];
const named = (contracts: EndpointContract[]) =>
  contracts.map((contract) => [contract.id, contract] as const);
const ofMembers = all.filter(({ access }) => access === 'member');

let server: TestServer;
let engineer: Caller;
let outsider: Caller;
let ids: Record<string, string>;

beforeAll(async () => {
  server = await startTestServer();
  engineer = await server.as('fieldEngineer');
  outsider = await addPerson(server);
  ids = { fieldId: server.fieldId, ...(await requestPlan(server, engineer)) };
});
afterAll(() => server.stop());

/** A call that is right in every way but the one that a test changes. */
function call(
  caller: Caller,
  contract: EndpointContract,
  changed: Record<string, string> = {},
): Promise<Reply> {
  const path = contract.path.replaceAll(/:(\w+)/g, (_all, name: string) => ({ ...ids, ...changed })[name]!);
  return contract.method === 'GET' ? caller.get(path) : caller.post(path, planRequest());
}

function expectRefusal(reply: Reply, status: number, code: string): void {
  expect(reply.body).toMatchObject({ error: { code } });
  expect(reply.status).toBe(status);
  const { error } = errorReply.parse(reply.body);
  expect(error.message).toMatch(/^[A-Z].*\.$/);
  expect(reply.headers.get('cache-control')).toBe('no-store');
}

describe('without a session', () => {
  test.each(named(all.filter(({ access }) => access !== 'public')))(
    '%s answers 401',
    async (_id, contract) => {
      expectRefusal(await call(server.stranger, contract), 401, 'NOT_SIGNED_IN');
    },
  );

  test('a cookie that was made up is no session', async () => {
    const reply = await server.stranger.get('/api/me', { cookie: 'stillfield.session_token=made.up' });
    expectRefusal(reply, 401, 'NOT_SIGNED_IN');
  });

  test('nothing tells apart what exists and what does not', async () => {
    const [known, unknown] = await Promise.all([
      call(server.stranger, endpoints.getPlan),
      call(server.stranger, endpoints.getPlan, { fieldId: 'no-such-field' }),
    ]);
    expect(known.body).toEqual(unknown.body);
  });
});

describe('for somebody of another field', () => {
  test.each(named(ofMembers))('%s answers 404, as for a field that does not exist', async (_id, contract) => {
    const reply = await call(outsider, contract);
    expectRefusal(reply, 404, 'NOT_FOUND');
    expect(reply.body).toEqual((await call(outsider, contract, { fieldId: 'no-such-field' })).body);
  });
});

describe('for a member', () => {
  test.each(named(ofMembers.filter(({ path }) => path.includes(':planId'))))(
    '%s of a plan that does not exist answers 404',
    async (_id, contract) => {
      expectRefusal(await call(engineer, contract, { planId: 'no-such-plan' }), 404, 'NOT_FOUND');
    },
  );

  test.each(named(ofMembers.filter(({ path }) => path.includes(':jobId'))))(
    '%s of a job that does not exist answers 404',
    async (_id, contract) => {
      expectRefusal(await call(engineer, contract, { jobId: 'no-such-job' }), 404, 'NOT_FOUND');
    },
  );

  test.each(named(ofMembers))('%s with an identifier of 65 characters answers 422', async (_id, contract) => {
    const name = contract.path.match(/:(\w+)(?!.*:)/)![1]!;
    const reply = await call(engineer, contract, { [name]: 'x'.repeat(65) });
    expectRefusal(reply, 422, 'BAD_REQUEST');
    expect(reply.body.error.fields).toEqual([{ path: `params.${name}`, message: expect.any(String) }]);
  });
});

describe('for a role that may not', () => {
  const guarded = [
    endpoints.getPlanDefaults,
    endpoints.buildPlan,
    endpoints.withdrawPlan,
    endpoints.cancelJob,
  ];
  const others = ['productionLead', 'hseOfficer', 'administrator'] as const;
  test.each(others.flatMap((role) => guarded.map((contract) => [contract.id, role, contract] as const)))(
    '%s by a %s answers 403 with the reason',
    async (_id, role, contract) => {
      const reply = await call(await server.as(role), contract);
      expectRefusal(reply, 403, 'NOT_ALLOWED');
      expect(reply.body.error.message).toMatch(/field engineer/);
    },
  );
});

describe('an address that is not there', () => {
  test.each(['/api/nothing', '/api/fields/x/y/z', '/api/auth/sign-up/email', '/api/auth/get-session'])(
    '%s answers 404',
    async (path) => {
      expectRefusal(await engineer.get(path), 404, 'NOT_FOUND');
    },
  );

  test('nobody makes an account for themselves', async () => {
    const person = { name: 'Me', email: 'me@example.com', password: 'a long password' };
    expectRefusal(await server.stranger.post('/api/auth/sign-up/email', person), 404, 'NOT_FOUND');
  });

  test('a method that an address does not have answers 404', async () => {
    expect((await engineer.raw('/api/me', { method: 'DELETE' })).status).toBe(404);
  });
});

describe('a body that cannot be read', () => {
  const post = (body: string) =>
    engineer.raw(`/api/fields/${server.fieldId}/plans`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', origin: server.url },
      body,
    });

  test('no JSON answers 422', async () => {
    const response = await post('{"weeks": ');
    expect(response.status).toBe(422);
    expect(await response.json()).toMatchObject({ error: { code: 'BAD_REQUEST' } });
  });

  test('more than 100 kB answers 413', async () => {
    expect((await post(JSON.stringify({ notes: 'x'.repeat(101 * 1024) }))).status).toBe(413);
  });
});
