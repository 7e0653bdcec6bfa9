import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { readConfig, type Config } from '../../server/config';
import type { Replacements } from '../../server/context';
import { DEMO_PEOPLE } from '../../server/demo/people';
import type { Scenario } from '../../models/scenario/types';
import { startServer, type RunningServer } from '../../server/start-server';
import type { Role } from '../../src/contract/enums';
import type { Model } from '../../server/model';
import { buildSmallField } from './small-field';

export type Script = 'instant' | 'slow' | 'late' | 'deaf' | 'leave' | 'broken' | 'impossible';

/** A thread drops the query of the file it starts from, so it starts from an import that keeps it. */
function scriptedWorker(script: Script): URL {
  const file = new URL('./workers/scripted-worker.mjs', import.meta.url);
  return new URL(`data:text/javascript,${encodeURIComponent(`import '${file.href}?do=${script}'`)}`);
}

/** A model that does as told in no time; for tests of jobs, not of numbers. */
export function scriptedModel(script: Script = 'instant'): Model {
  return {
    readScenario: (json) => json as Scenario,
    heatRangePerWeek: ({ plan }) => ({
      leastHeatJ: Array.from({ length: plan!.weeks }, () => 3e12),
      mostHeatJ: Array.from({ length: plan!.weeks }, () => 1.6e13),
    }),
    workerEntry: scriptedWorker(script),
  };
}

export interface TestServer extends RunningServer {
  dataDir: string;
  fieldId: string;
  /** Somebody without a session. */
  stranger: Caller;
  /** A signed-in member of the field with one role. */
  as(role: Role): Promise<Caller>;
  signIn(email: string, password: string): Promise<Caller>;
}

export interface Reply<Body = any> {
  status: number;
  headers: Headers;
  body: Body;
}

export interface Caller {
  readonly cookie: string;
  get(path: string, headers?: Record<string, string>): Promise<Reply>;
  post(path: string, body?: unknown, headers?: Record<string, string>): Promise<Reply>;
  raw(path: string, init?: RequestInit): Promise<Response>;
}

export function makeDataDir(): { path: string; remove(): void } {
  const path = mkdtempSync(join(tmpdir(), 'stillfield-test-'));
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}

/** A real server on a free port with a database of its own, filled with the small field. */
export async function startTestServer(
  replacements: Replacements & { config?: Partial<Config>; dataDir?: string } = {},
): Promise<TestServer> {
  const { config: changes, dataDir: givenDir, ...rest } = replacements;
  const dir = givenDir ? { path: givenDir, remove: () => {} } : makeDataDir();
  const config = readConfig({ NODE_ENV: 'test', DATA_DIR: dir.path, PORT: '0' });
  const server = await startServer(
    { ...config, ...changes },
    { model: scriptedModel(), demoField: async (nowAt) => buildSmallField(nowAt), ...rest },
  );
  const stranger = makeCaller(server.url, '');
  const signIn = async (email: string, password: string) => {
    const reply = await stranger.post('/api/auth/sign-in/email', { email, password });
    if (reply.status !== 200) throw new Error(`${email} could not sign in: ${JSON.stringify(reply.body)}`);
    const cookie = reply.headers.getSetCookie().map((entry) => entry.split(';')[0]);
    return makeCaller(server.url, cookie.join('; '));
  };
  const field = server.context.database.sqlite.prepare('select id from fields').get() as { id: string };
  return {
    ...server,
    dataDir: dir.path,
    fieldId: field?.id,
    stranger,
    signIn,
    as(role) {
      const person = DEMO_PEOPLE.find((candidate) => candidate.role === role)!;
      return signIn(person.email, person.password);
    },
    async stop() {
      await server.stop();
      dir.remove();
    },
  };
}

export function makeCaller(url: string, cookie: string): Caller {
  const raw = (path: string, init: RequestInit = {}) =>
    fetch(`${url}${path}`, { ...init, headers: { ...(cookie ? { cookie } : {}), ...init.headers } });
  const read = async (response: Response): Promise<Reply> => {
    const text = await response.text();
    const isJson = response.headers.get('content-type')?.includes('json');
    return { status: response.status, headers: response.headers, body: isJson ? JSON.parse(text) : text };
  };
  return {
    cookie,
    raw,
    get: async (path, headers) => read(await raw(path, { headers })),
    // A browser names the page that asks, and the server insists on it where a session is involved.
    post: async (path, body = {}, headers) =>
      read(
        await raw(path, {
          method: 'POST',
          headers: { 'content-type': 'application/json', origin: url, ...headers },
          body: JSON.stringify(body),
        }),
      ),
  };
}
