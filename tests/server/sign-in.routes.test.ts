import { afterEach, beforeEach, describe, expect, test } from 'vitest';

import { DEMO_PEOPLE } from '../../server/demo/people';
import { startTestServer, type TestServer } from '../support/test-server';

let server: TestServer;
beforeEach(async () => {
  server = await startTestServer();
});
afterEach(() => server.stop());

const [{ email, password }] = DEMO_PEOPLE;
const signIn = (body: unknown, headers?: Record<string, string>) =>
  server.stranger.post('/api/auth/sign-in/email', body, headers);

describe('signing in is refused', () => {
  test('401 for a wrong password, in the same words as for an account that does not exist', async () => {
    const wrong = await signIn({ email, password: 'not the password' });
    const unknown = await signIn({ email: 'nobody@example.com', password: 'not the password' });
    expect([wrong.status, wrong.body.error.code]).toEqual([401, 'WRONG_SIGN_IN']);
    expect([unknown.status, unknown.body]).toEqual([401, wrong.body]);
    expect(wrong.headers.getSetCookie()).toEqual([]);
  });

  test.each([
    [{}],
    [{ email }],
    [{ password }],
    [{ email: 'not an address', password }],
    [{ email: [email], password }],
  ])('422 for %j', async (body) => {
    const reply = await signIn(body);
    expect([reply.status, reply.body.error.code]).toEqual([422, 'BAD_REQUEST']);
  });

  test.each([
    ['another site', { origin: 'https://elsewhere.example.com' }],
    ['a page without an origin of its own', { origin: 'null' }],
    ['another site, as the browser tells', { 'sec-fetch-site': 'cross-site' }],
  ])('403 from %s', async (_case, headers) => {
    const reply = await signIn({ email, password }, headers);
    expect([reply.status, reply.body.error.code]).toEqual([403, 'NOT_ALLOWED']);
    expect(reply.headers.getSetCookie()).toEqual([]);
  });

  test('429 after ten failures on one account, the right password included; others still get in', async () => {
    for (let attempt = 1; attempt <= 10; attempt++) {
      expect((await signIn({ email, password: `guess number ${attempt}` })).status).toBe(401);
    }
    const reply = await signIn({ email: email.toUpperCase(), password });
    expect([reply.status, reply.body.error.code]).toEqual([429, 'TOO_MANY_REQUESTS']);
    expect(reply.body.error.message).toMatch(/quarter of an hour/);
    const other = DEMO_PEOPLE[1]!;
    expect((await signIn({ email: other.email, password: other.password })).status).toBe(200);
  });

  test('429 after forty failures from one address, whatever the account', async () => {
    for (let attempt = 1; attempt <= 40; attempt++) {
      const reply = await signIn({ email: `guess-${attempt}@example.com`, password: 'a guess' });
      expect(reply.status).toBe(401);
    }
    expect((await signIn({ email, password })).status).toBe(429);
  });
});

describe('a session', () => {
  test('signing in as often as one likes is no failure', async () => {
    for (let attempt = 1; attempt <= 12; attempt++) {
      expect((await signIn({ email, password })).status).toBe(200);
    }
  });

  test('is a cookie that scripts cannot read and other sites do not send; no token in the answer', async () => {
    const reply = await signIn({ email: email.toUpperCase(), password });
    expect(reply.body).toEqual({ ok: true });
    const [cookie] = reply.headers.getSetCookie();
    expect(cookie).toMatch(/^stillfield\.session_token=[^;]+/);
    expect(cookie).toMatch(/; HttpOnly/i);
    expect(cookie).toMatch(/; SameSite=Lax/i);
    expect(cookie).not.toMatch(/; Secure/i);
  });

  test('travels over TLS alone where the public address is https', async () => {
    await server.stop();
    server = await startTestServer({ config: { publicUrl: 'https://stillfield.example.com', port: 4311 } });
    const reply = await signIn({ email, password }, { origin: 'https://stillfield.example.com' });
    expect(reply.headers.getSetCookie()[0]).toMatch(/^__Secure-stillfield\.session_token=.*; Secure/i);
  });

  test('says who it is and where they belong', async () => {
    const engineer = await server.signIn(email, password);
    expect((await engineer.get('/api/me')).body).toEqual({
      id: expect.any(String),
      name: 'Maren Oakhill',
      email,
      memberships: [{ fieldId: server.fieldId, fieldName: 'Small Fen', roles: ['fieldEngineer'] }],
    });
  });

  test('ends with the sign-out, on the server too', async () => {
    const engineer = await server.signIn(email, password);
    expect((await engineer.post('/api/auth/sign-out')).status).toBe(200);
    expect((await engineer.get('/api/me')).status).toBe(401);
  });

  test('changes nothing for a page of another site that has the cookie', async () => {
    const engineer = await server.signIn(email, password);
    const reply = await engineer.post(
      `/api/fields/${server.fieldId}/plans`,
      {},
      { origin: 'https://elsewhere.example.com' },
    );
    expect([reply.status, reply.body.error.code]).toEqual([403, 'NOT_ALLOWED']);
  });

  test('is over when its time is', async () => {
    const engineer = await server.signIn(email, password);
    server.context.database.sqlite.exec('update sessions set expires_at = 1');
    expect((await engineer.get('/api/me')).status).toBe(401);
  });
});

test('a demonstration lists the accounts that it has', async () => {
  const { body } = await server.stranger.get('/api/demo-sign-ins');
  expect(body.signIns).toEqual(DEMO_PEOPLE);
  server.context.database.sqlite.prepare('update people set is_demo = 0 where email = ?').run(email);
  const { body: fewer } = await server.stranger.get('/api/demo-sign-ins');
  expect(fewer.signIns).toEqual(DEMO_PEOPLE.slice(1));
});
