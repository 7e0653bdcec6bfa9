import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

import { afterEach, beforeEach, expect, test } from 'vitest';

import { makeDataDir, startTestServer } from '../support/test-server';

const COMMAND = fileURLToPath(new URL('../../server/cli/admin.ts', import.meta.url));

let dir: ReturnType<typeof makeDataDir>;
beforeEach(() => {
  dir = makeDataDir();
});
afterEach(() => dir.remove());

function admin(words: string[], input: string) {
  const { status, stdout, stderr } = spawnSync(process.execPath, ['--import', 'tsx', COMMAND, ...words], {
    input,
    encoding: 'utf8',
    env: { ...process.env, DATA_DIR: dir.path, NODE_ENV: 'test' },
  });
  return { status, stdout, stderr };
}

const WHO = ['--name', 'Ada Fernhill', '--email', 'Ada@example.com'];

test.each([
  [[], 'a long password', /--name is missing/],
  [['--name', 'Ada'], 'a long password', /--email is not an address/],
  [['--name', 'Ada', '--email', 'ada'], 'a long password', /--email is not an address/],
  [WHO, 'short', /at least 12 characters/],
])('%j exits with 2 and says why', (words, password, reason) => {
  const { status, stderr } = admin(words, password);
  expect([status, stderr]).toEqual([2, expect.stringMatching(reason)]);
});

test('the administrator can sign in, to every field there is', async () => {
  await (await startTestServer({ dataDir: dir.path })).stop();
  const { status, stdout } = admin(WHO, 'a long password\n');
  expect([status, stdout]).toEqual([
    0,
    'Ada Fernhill can sign in as Ada@example.com, administrator of 1 field.\n',
  ]);
  const server = await startTestServer({ dataDir: dir.path });
  const person = await server.signIn('ada@example.com', 'a long password');
  expect((await person.get('/api/me')).body.memberships).toMatchObject([{ roles: ['administrator'] }]);
  await server.stop();

  const again = admin(WHO, 'a long password\n');
  expect([again.status, again.stderr]).toEqual([2, expect.stringMatching(/has an account already/)]);
});
