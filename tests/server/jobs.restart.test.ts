import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';

import Database from 'better-sqlite3';
import { afterEach, beforeEach, expect, test } from 'vitest';

import { DEMO_PEOPLE } from '../../server/demo/people';
import { planRequest } from '../support/plan-requests';
import { readEvents } from '../support/read-events';
import { makeCaller, makeDataDir, type Caller } from '../support/test-server';

const PROGRAM = fileURLToPath(new URL('../support/slow-server.ts', import.meta.url));

let dir: ReturnType<typeof makeDataDir>;
let child: ChildProcess;
beforeEach(() => {
  dir = makeDataDir();
});
afterEach(async () => {
  await end('SIGKILL');
  dir.remove();
});

async function start(): Promise<Caller> {
  child = spawn(process.execPath, ['--import', 'tsx', PROGRAM], {
    env: { ...process.env, DATA_DIR: dir.path },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const [url] = (await once(createInterface({ input: child.stdout! }), 'line')) as [string];
  const { email, password } = DEMO_PEOPLE.find(({ role }) => role === 'fieldEngineer')!;
  const reply = await makeCaller(url, '').post('/api/auth/sign-in/email', { email, password });
  return makeCaller(url, reply.headers.getSetCookie()[0]!.split(';')[0]!);
}

async function end(signal: 'SIGKILL' | 'SIGTERM'): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const ended = once(child, 'exit');
  child.kill(signal);
  await ended;
}

/** The row as the process left it. */
function rowInFile(): { state: string; attempts: number } {
  const database = new Database(`${dir.path}/stillfield.sqlite`);
  const row = database.prepare('select state, attempts from jobs').get();
  database.close();
  return row as { state: string; attempts: number };
}

const untilComputing = { enough: (events: any[]) => /^Round/.test(events.at(-1)?.data.step) };

async function startPlan(engineer: Caller): Promise<string> {
  const [field] = (await engineer.get('/api/fields')).body.fields;
  const reply = await engineer.post(`/api/fields/${field.id}/plans`, planRequest());
  return `/api/fields/${field.id}/jobs/${reply.body.job.id}`;
}

test('a job that was running when the process was killed runs again once; the second crash fails it', async () => {
  const first = await start();
  const job = await startPlan(first);
  await readEvents(first, `${job}/events`, untilComputing);
  await end('SIGKILL');
  expect(rowInFile()).toEqual({ state: 'running', attempts: 1 });

  const second = await start();
  await readEvents(second, `${job}/events`, untilComputing);
  expect((await second.get(job)).body).toMatchObject({ state: 'running', attempts: 2 });
  await end('SIGKILL');
  expect(rowInFile()).toEqual({ state: 'running', attempts: 2 });

  const third = await start();
  const [last] = await readEvents(third, `${job}/events`);
  expect(last!.data).toMatchObject({
    state: 'failed',
    attempts: 2,
    failure: { code: 'INTERRUPTED', message: expect.stringContaining('stopped twice') },
  });
  // The plan stays as a draft that was never computed, and the next request is served.
  const fieldId = job.split('/')[3];
  const [plan] = (await third.get(`/api/fields/${fieldId}/plans`)).body.plans;
  expect(plan).toMatchObject({ state: 'draft', jobState: 'failed', outcome: null });
  await readEvents(third, `${await startPlan(third)}/events`, untilComputing);
});

test('a job survives an orderly stop as often as it takes', async () => {
  let engineer = await start();
  const job = await startPlan(engineer);
  for (let round = 1; round <= 3; round++) {
    await readEvents(engineer, `${job}/events`, untilComputing);
    await end('SIGTERM');
    expect(rowInFile()).toEqual({ state: 'queued', attempts: 0 });
    engineer = await start();
  }
  await readEvents(engineer, `${job}/events`, untilComputing);
  expect((await engineer.get(job)).body.attempts).toBe(1);
});
