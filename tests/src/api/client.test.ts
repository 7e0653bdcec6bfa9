import { describe, expect, it, vi } from 'vitest';

import { ApiError, callEndpoint, pathOf } from '../../../src/api/client';
import { getHealth } from '../../../src/contract/health';
import { getPlan, withdrawPlan } from '../../../src/contract/plans';
import { fakeServer, refusal } from '../support/fake-server';

const health = {
  status: 'ok',
  version: '0.1.0',
  modelVersion: '1',
  database: { ok: true, migration: null },
  queue: { running: 0, waiting: 0 },
};

describe('asking the server', () => {
  it('fills the path and hands back a reply that follows the contract', async () => {
    fakeServer({ 'GET /api/health': () => health });
    expect(await callEndpoint(getHealth, {})).toEqual(health);
    expect(pathOf(getPlan, { fieldId: 'a/b', planId: 'c' })).toBe('/api/fields/a%2Fb/plans/c');
  });

  it('tells a refusal by its code, its sentence and its fields', async () => {
    const fields = [{ path: 'weeks', message: 'Too many.' }];
    fakeServer({
      'POST /api/fields/f/plans/p/withdraw': () => ({
        status: 409,
        body: refusal('PLAN_NOT_DRAFT', 'Only a draft can be withdrawn.', fields),
      }),
    });
    const error = await callEndpoint(withdrawPlan, { params: { fieldId: 'f', planId: 'p' } }).catch((e) => e);
    expect(error).toBeInstanceOf(ApiError);
    expect(error).toMatchObject({ code: 'PLAN_NOT_DRAFT', status: 409, fields });
    expect(error.message).toBe('Only a draft can be withdrawn.');
  });

  it('lets nothing through that is not as agreed', async () => {
    vi.mocked(console.error).mockImplementation(() => {});
    fakeServer({ 'GET /api/health': () => ({ ...health, status: 'splendid' }) });
    await expect(callEndpoint(getHealth, {})).rejects.toMatchObject({ code: 'UNEXPECTED_REPLY' });
  });

  it('says so when nobody answers', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('failed')));
    await expect(callEndpoint(getHealth, {})).rejects.toMatchObject({ code: 'OFFLINE', status: 0 });
  });
});
