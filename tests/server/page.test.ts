import { mkdirSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { join } from 'node:path';
import { brotliCompressSync, gzipSync } from 'node:zlib';

import type { DestinationStream } from 'pino';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { DEMO_PEOPLE } from '../../server/demo/people';
import { makeLogger } from '../../server/log';
import { makeDataDir, startTestServer, type TestServer } from '../support/test-server';

const PAGE = '<!doctype html><title>Stillfield</title>';
const SCRIPT = 'console.log("a script");';

let server: TestServer;
let files: ReturnType<typeof makeDataDir>;
const logged: string[] = [];

beforeAll(async () => {
  files = makeDataDir();
  const write = (name: string, content: string | Buffer) => writeFileSync(join(files.path, name), content);
  mkdirSync(join(files.path, '_expo/static'), { recursive: true });
  write('index.html', PAGE);
  write('_expo/static/entry-0a1b.js', SCRIPT);
  write('_expo/static/entry-0a1b.js.br', brotliCompressSync(SCRIPT));
  write('_expo/static/entry-0a1b.js.gz', gzipSync(SCRIPT));
  write('favicon.ico', 'icon');
  write('.hidden', 'secret');
  const destination = { write: (line: string) => void logged.push(line) };
  server = await startTestServer({
    config: { webRoot: files.path },
    log: makeLogger('debug', destination as DestinationStream),
  });
});
afterAll(async () => {
  await server.stop();
  files.remove();
});

const get = (path: string, headers: Record<string, string> = {}) => server.stranger.raw(path, { headers });

describe('the page', () => {
  test.each(['/', '/sign-in', '/fields/x/plans/y?week=3'])('is answered at %s', async (path) => {
    const response = await get(path);
    expect([response.status, await response.text()]).toEqual([200, PAGE]);
    expect(response.headers.get('content-type')).toBe('text/html; charset=utf-8');
    expect(response.headers.get('cache-control')).toBe('no-cache');
  });

  test('runs no script but its own files, talks to nobody else and sits in no frame', async () => {
    const policy = (await get('/')).headers.get('content-security-policy')!;
    const directives = Object.fromEntries(
      policy.split(';').map((part) => {
        const [name, ...sources] = part.trim().split(' ');
        return [name, sources.join(' ')];
      }),
    );
    expect(directives).toEqual({
      'default-src': "'self'",
      'script-src': "'self'",
      'script-src-attr': "'none'",
      'style-src': "'self' 'unsafe-inline'",
      'img-src': "'self' data: blob:",
      'font-src': "'self' data:",
      'connect-src': "'self'",
      'object-src': "'none'",
      'base-uri': "'self'",
      'form-action': "'self'",
      'frame-ancestors': "'none'",
    });
  });

  test('comes with the other headers that browsers heed, and does not say what serves it', async () => {
    const { headers } = await get('/');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('x-frame-options')).toBe('DENY');
    expect(headers.get('referrer-policy')).toBe('no-referrer');
    expect(headers.get('x-powered-by')).toBeNull();
    // Over plain HTTP it would lock people out.
    expect(headers.get('strict-transport-security')).toBeNull();
  });
});

describe('its files', () => {
  test.each([
    ['br, gzip', 'br'],
    ['gzip', 'gzip'],
    ['identity', null],
  ])('for "%s" come as %s, for a year', async (accepted, encoding) => {
    const response = await get('/_expo/static/entry-0a1b.js', { 'accept-encoding': accepted });
    expect(response.headers.get('content-encoding')).toBe(encoding);
    expect(response.headers.get('vary')).toMatch(/accept-encoding/i);
    expect(response.headers.get('cache-control')).toBe('public, max-age=31536000, immutable');
    expect(response.headers.get('content-type')).toMatch(/javascript/);
    expect(await response.text()).toBe(SCRIPT);
  });

  test.each(['/_expo/static/entry-gone.js', '/gone.png', '/.hidden', '/assets/../.hidden'])(
    '%s is not there, and no page is sent in its place',
    async (path) => {
      expect((await get(path)).status).toBe(404);
    },
  );

  test.each([
    '/..%2f..%2fpackage.json',
    '/%2e%2e/%2e%2e/package.json',
    '/_expo/..%5c..%5cpackage.json',
    '/%00.js',
    '/%zz',
  ])('nothing outside is served: %s', async (path) => {
    const { status, body } = await rawGet(path);
    expect(status).toBeGreaterThanOrEqual(400);
    expect(body).not.toContain('dependencies');
  });
});

test('where the application has not been built, the server says so', async () => {
  const bare = await startTestServer({ config: { webRoot: join(files.path, 'nothing') } });
  const response = await bare.stranger.raw('/');
  expect([response.status, await response.text()]).toEqual([503, expect.stringContaining('npm start')]);
  await bare.stop();
});

test('the log holds neither passwords nor sessions', async () => {
  const { email, password } = DEMO_PEOPLE[0]!;
  const { cookie } = await server.signIn(email, password);
  await server.stranger.get('/api/me', { cookie });
  await server.stranger.post('/api/auth/sign-in/email', { email, password: 'a wrong password' });
  const text = logged.join('');
  expect(text).toContain('/api/me');
  const token = cookie.split('=')[1]!;
  for (const secret of [
    password,
    'a wrong password',
    token,
    token.split('.')[0]!,
    server.context.config.authSecret,
  ]) {
    expect(text).not.toContain(secret);
  }
});

/** Sends the path as it is; `fetch` would tidy it up first. */
function rawGet(path: string): Promise<{ status: number; body: string }> {
  const { hostname, port } = new URL(server.url);
  return new Promise((done, failed) => {
    request({ hostname, port, path }, (response) => {
      let body = '';
      response.on('data', (part) => (body += part));
      response.on('end', () => done({ status: response.statusCode!, body }));
    })
      .on('error', failed)
      .end();
  });
}
