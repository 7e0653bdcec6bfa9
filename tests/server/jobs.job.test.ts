import { afterEach, describe, expect, test } from 'vitest';

import { realModel } from '../../server/model';
import { buildSmallField } from '../support/small-field';
import { hasEnded, requestPlan, waitForJob } from '../support/plan-requests';
import { readEvents } from '../support/read-events';
import {
  scriptedModel,
  startTestServer,
  type Caller,
  type Script,
  type TestServer,
} from '../support/test-server';

let server: TestServer;
let engineer: Caller;
afterEach(() => server.stop());

type Replacements = NonNullable<Parameters<typeof startTestServer>[0]>;
async function start(model: Script | 'real', more: Replacements = {}): Promise<void> {
  server = await startTestServer({ model: model === 'real' ? realModel : scriptedModel(model), ...more });
  engineer = await server.as('fieldEngineer');
}

const jobPath = (jobId: string) => `/api/fields/${server.fieldId}/jobs/${jobId}`;
const readJob = async (jobId: string) => (await engineer.get(jobPath(jobId))).body;
const isRunning = (job: { state: string; progress: number }) => job.state === 'running' && job.progress > 0;

async function endOf(jobId: string) {
  await waitForJob(server, jobId, hasEnded);
  return readJob(jobId);
}

describe('the thread with the real model', () => {
  test('computes a plan that keeps what was asked, with its bound', async () => {
    await start('real');
    const { planId, jobId } = await requestPlan(server, engineer);
    expect(await endOf(jobId)).toMatchObject({ state: 'done', progress: 1, attempts: 1, failure: null });
    const { result } = (await engineer.get(`/api/fields/${server.fieldId}/plans/${planId}`)).body;
    const expected = result.totals.expectedEvents;
    // The bound never lies above the plan. Steps of 0.5 l/s are coarse for a field of 40 l/s: rounding to
    // them is most of the gap.
    expect(result.lowerBound).toBeLessThanOrEqual(expected * (1 + 1e-9));
    expect(result.gap).toBeLessThan(0.05);
    expect(result.check.relativeDifference).toBeLessThan(0.002);
    // Holding today's rates is no plan here, and the answer says why.
    expect(result.comparison.hold.breaks).toEqual([
      'I-2 runs at up to 12.0 l/s although it is out in week 2.',
    ]);
    for (const week of result.weeks.filter((entry: any) => !entry.lookAhead)) {
      expect(week.heatJ).toBeGreaterThanOrEqual(week.heatTargetJ * (1 - 1e-6));
      expect(week.heatJ).toBeLessThanOrEqual(week.heatCeilingJ * (1 + 1e-6));
    }
    const outOfService = result.wells.find((well: any) => well.name === 'I-2');
    expect(outOfService.weeklyState[1]).toBe('outage');
    expect(outOfService.weeklyM3PerS[1]).toBe(0);
  });

  test('says which limits collide where no plan keeps all of them', async () => {
    await start('real');
    const { planId, jobId } = await requestPlan(server, engineer, { heatTargetJPerWeek: [1e15] });
    const job = await endOf(jobId);
    expect(job).toMatchObject({ state: 'failed', failure: { code: 'NO_PLAN' } });
    expect(job.failure.details.length).toBeGreaterThan(0);
    expect(job.failure.details.join(' ')).toMatch(/heat/i);
    expect((await engineer.get(`/api/fields/${server.fieldId}/plans/${planId}`)).body.result).toBeNull();
  });

  test('stops when it is asked to, without being cut off', async () => {
    const demoField: Replacements['demoField'] = async (nowAt) => {
      const field = buildSmallField(nowAt, 60);
      return { ...field, reservoir: { ...field.reservoir, cellsX: 120, cellsY: 120 } };
    };
    await start('real', { demoField });
    const { jobId } = await requestPlan(server, engineer, { weeks: 12, lookAheadWeeks: 12 });
    await waitForJob(server, jobId, (job) => job.state === 'running');
    expect((await engineer.post(`${jobPath(jobId)}/cancel`)).body.state).toBe('cancelled');
    await server.context.jobs.idle();
    expect(await readJob(jobId)).toMatchObject({ state: 'cancelled', planId: expect.any(String) });
    expect((await engineer.get('/api/health')).body.queue).toEqual({ running: 0, waiting: 0 });
  });
});

describe('a running job', () => {
  test('shows how far it is, what it does and what is left', async () => {
    await start('slow');
    const { jobId } = await requestPlan(server, engineer);
    await waitForJob(server, jobId, (job) => job.progress > 0.2);
    const job = await readJob(jobId);
    expect(job).toMatchObject({ state: 'running', attempts: 1, can: { cancel: true } });
    expect(job.step).toMatch(/^Round \d+$/);
    expect(job.secondsLeft).toBeGreaterThan(0);
    expect(job.startedAt).toBeGreaterThanOrEqual(job.createdAt);
    const week = (await engineer.get(`/api/fields/${server.fieldId}`)).body;
    expect(week.runningJobId).toBe(jobId);
  });

  test('that does not listen is cut off after the grace period', async () => {
    await start('deaf', { jobGraceMs: 100 });
    const { jobId } = await requestPlan(server, engineer);
    await waitForJob(server, jobId, isRunning);
    await engineer.post(`${jobPath(jobId)}/cancel`);
    await server.context.jobs.idle();
    expect((await readJob(jobId)).state).toBe('cancelled');
  });

  test('that takes longer than the limit fails with the limit named', async () => {
    await start('deaf', { config: { jobTimeLimitS: 0.2 }, jobGraceMs: 100 });
    const { jobId } = await requestPlan(server, engineer);
    expect(await endOf(jobId)).toMatchObject({ state: 'failed', failure: { code: 'TOO_LONG' } });
    await server.context.jobs.idle();
  });

  test.each([
    ['impossible', 'NO_PLAN', 'The heat target of week 1 is 120 MWh too high.'],
    ['leave', 'CRASHED', undefined],
    ['broken', 'INTERNAL', undefined],
  ] as const)('whose thread is "%s" fails as %s and keeps the rest going', async (script, code, detail) => {
    await start(script);
    const { planId, jobId } = await requestPlan(server, engineer);
    const job = await endOf(jobId);
    expect(job).toMatchObject({ state: 'failed', failure: { code }, secondsLeft: null });
    expect(job.failure.message).toMatch(/^[A-Z].*[.:]$/);
    expect(job.failure.details[0]).toBe(detail);
    // Nothing of a result stays behind, and the queue goes on.
    expect((await engineer.get(`/api/fields/${server.fieldId}/plans/${planId}`)).body).toMatchObject({
      result: null,
      plan: { outcome: null },
    });
    const next = await requestPlan(server, engineer);
    expect((await endOf(next.jobId)).state).toBe('failed');
  });

  test('goes back to waiting when the server is stopped, and no try is lost', async () => {
    await start('slow');
    const { jobId } = await requestPlan(server, engineer);
    await waitForJob(server, jobId, isRunning);
    const { jobs, database } = server.context;
    await jobs.stop();
    const row = database.sqlite.prepare('select state, attempts, progress from jobs').get();
    expect(row).toEqual({ state: 'queued', attempts: 0, progress: 0 });
    expect(jobId).toBeTruthy();
  });
});

describe('waiting jobs', () => {
  test('run one after the other, oldest first, and one that waits can be stopped', async () => {
    await start('slow');
    const first = await requestPlan(server, engineer);
    await waitForJob(server, first.jobId, isRunning);
    const second = await requestPlan(server, engineer, { name: 'Second', weeks: 4 });
    const third = await requestPlan(server, engineer, { name: 'Third', weeks: 5 });
    expect((await engineer.get('/api/health')).body.queue).toEqual({ running: 1, waiting: 2 });
    const listed = (await engineer.get(`/api/fields/${server.fieldId}/jobs`)).body.jobs;
    expect(listed.map(({ id }: { id: string }) => id)).toEqual([third.jobId, second.jobId, first.jobId]);

    await engineer.post(`${jobPath(second.jobId)}/cancel`);
    await engineer.post(`${jobPath(first.jobId)}/cancel`);
    await waitForJob(server, third.jobId, isRunning);
    expect((await readJob(second.jobId)).startedAt).toBeNull();
    await engineer.post(`${jobPath(third.jobId)}/cancel`);
    await server.context.jobs.idle();
  });
});

describe('the events of a job', () => {
  const follow = (jobId: string, options?: Parameters<typeof readEvents>[2]) =>
    readEvents(engineer, `${jobPath(jobId)}/events`, options);

  test('tell every change until it ends, then the stream ends', async () => {
    await start('slow');
    const { jobId } = await requestPlan(server, engineer);
    const reading = follow(jobId);
    await waitForJob(server, jobId, (job) => job.progress > 0.3);
    await engineer.post(`${jobPath(jobId)}/cancel`);
    const events = await reading;
    expect(new Set(events.map(({ event }) => event))).toEqual(new Set(['job']));
    expect(events.map(({ data }) => data.progress)).toEqual(
      events.map(({ data }) => data.progress).sort((a, b) => a - b),
    );
    expect(events.at(-1)!.data).toEqual(await readJob(jobId));
    const ids = events.map(({ id }) => Number(id));
    expect(ids).toEqual([...new Set(ids)].sort((a, b) => a - b));
  });

  test('of one that has ended: its last state, at once', async () => {
    await start('instant');
    const { jobId } = await requestPlan(server, engineer);
    const job = await endOf(jobId);
    expect((await follow(jobId)).map(({ data }) => data)).toEqual([job]);
  });

  test('are not repeated to a page that comes back and knows the end', async () => {
    await start('instant');
    const { jobId } = await requestPlan(server, engineer);
    await endOf(jobId);
    const [last] = await follow(jobId);
    const again = await engineer.get(`${jobPath(jobId)}/events`, { 'last-event-id': last!.id });
    expect([again.status, again.body]).toEqual([204, '']);
  });

  test('are forgotten once the page is gone', async () => {
    await start('slow');
    const { jobId } = await requestPlan(server, engineer);
    await follow(jobId, { enough: (events) => events.length >= 2 });
    await engineer.post(`${jobPath(jobId)}/cancel`);
    await server.context.jobs.idle();
    await expect.poll(() => server.context.jobs.watchers(jobId)).toBe(0);
  });

  test('come as a stream that nobody stores or collects', async () => {
    await start('instant');
    const { jobId } = await requestPlan(server, engineer);
    const response = await engineer.raw(`${jobPath(jobId)}/events`);
    await response.text();
    expect(response.headers.get('content-type')).toBe('text/event-stream; charset=utf-8');
    expect(response.headers.get('cache-control')).toBe('no-store, no-transform');
    expect(response.headers.get('x-accel-buffering')).toBe('no');
  });
});
