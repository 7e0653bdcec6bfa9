import { afterEach, expect, test } from 'vitest';

import { listAudit } from '../../db/store/audit';
import { requestPlan, hasEnded, planRequest, waitForJob } from '../support/plan-requests';
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

async function start(script: Script): Promise<void> {
  server = await startTestServer({ model: scriptedModel(script) });
  engineer = await server.as('fieldEngineer');
}

const jobPath = (jobId: string) => `/api/fields/${server.fieldId}/jobs/${jobId}`;
const cancel = (jobId: string) => engineer.post(`${jobPath(jobId)}/cancel`);
const readJob = async (jobId: string) => (await engineer.get(jobPath(jobId))).body;
const readResult = async (planId: string) =>
  (await engineer.get(`/api/fields/${server.fieldId}/plans/${planId}`)).body.result;
const onRecord = () => listAudit(server.context.database.db, server.fieldId).map(({ event }) => event);
const countOf = (event: string) => onRecord().filter((entry) => entry === event).length;
const isRunning = (job: { state: string; progress: number }) => job.state === 'running' && job.progress > 0;

test('of two cancels at the same moment one takes and one is told that it is over', async () => {
  await start('slow');
  const { jobId } = await requestPlan(server, engineer);
  await waitForJob(server, jobId, isRunning);
  const replies = await Promise.all([cancel(jobId), cancel(jobId)]);
  expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
  expect(replies.find(({ status }) => status === 409)!.body.error.code).toBe('JOB_ALREADY_ENDED');
  expect(countOf('jobCancelled')).toBe(1);
});

test('a result that comes in after a cancel is dropped', async () => {
  await start('late');
  const { planId, jobId } = await requestPlan(server, engineer);
  await waitForJob(server, jobId, isRunning);
  expect((await cancel(jobId)).status).toBe(200);
  await server.context.jobs.idle();
  expect(await readJob(jobId)).toMatchObject({ state: 'cancelled', step: 'Stopped' });
  expect(await readResult(planId)).toBeNull();
  expect(onRecord()).toEqual(['demoFieldSeeded', 'planRequested', 'jobCancelled']);
});

test('a cancel that comes in after the result is refused, and the result stays', async () => {
  await start('instant');
  const { planId, jobId } = await requestPlan(server, engineer);
  await waitForJob(server, jobId, hasEnded);
  expect((await cancel(jobId)).status).toBe(409);
  expect(await readJob(jobId)).toMatchObject({ state: 'done', can: { cancel: false } });
  expect(await readResult(planId)).not.toBeNull();
});

test('cancel against finish, thirty times: exactly one outcome each time', async () => {
  await start('instant');
  const outcomes: string[] = [];
  for (let round = 1; round <= 30; round++) {
    // A target of its own, so that nothing is taken over from the round before.
    const heatTargetJPerWeek = [1e13 + round * 1e9];
    const { planId, jobId } = await requestPlan(server, engineer, { heatTargetJPerWeek });
    // Odd rounds cancel as soon as the thread speaks, even ones once it may have finished.
    await waitForJob(server, jobId, (job) => job.state !== 'queued');
    if (round % 2 === 0) await readJob(jobId);
    const { status } = await cancel(jobId);
    await server.context.jobs.idle();
    const job = await readJob(jobId);
    const hasResult = (await readResult(planId)) !== null;
    expect({ status, state: job.state, hasResult }).toEqual(
      status === 200
        ? { status: 200, state: 'cancelled', hasResult: false }
        : { status: 409, state: 'done', hasResult: true },
    );
    outcomes.push(job.state);
  }
  const times = (state: string) => outcomes.filter((outcome) => outcome === state).length;
  expect(countOf('jobCancelled')).toBe(times('cancelled'));
  expect(countOf('planComputed')).toBe(times('done'));
});

test('of two identical requests at the same moment each gets its plan, and one computation serves both', async () => {
  await start('instant');
  const path = `/api/fields/${server.fieldId}/plans`;
  const replies = await Promise.all([engineer.post(path, planRequest()), engineer.post(path, planRequest())]);
  expect(replies.map(({ status }) => status)).toEqual([202, 202]);
  const jobIds: string[] = replies.map(({ body }) => body.job.id);
  await Promise.all(jobIds.map((jobId) => waitForJob(server, jobId, hasEnded)));

  const jobs = await Promise.all(jobIds.map(readJob));
  expect(jobs.map(({ state }) => state)).toEqual(['done', 'done']);
  expect(jobs.map(({ attempts }) => attempts).sort()).toEqual([0, 1]);
  const { plans } = (await engineer.get(path)).body;
  expect(plans.map(({ number }: { number: number }) => number)).toEqual([2, 1]);
  expect(countOf('planComputed')).toBe(2);
});

test('of two withdrawals at the same moment one takes', async () => {
  await start('instant');
  const { planId, jobId } = await requestPlan(server, engineer);
  await waitForJob(server, jobId, hasEnded);
  const withdraw = () => engineer.post(`/api/fields/${server.fieldId}/plans/${planId}/withdraw`);
  const replies = await Promise.all([withdraw(), withdraw()]);
  expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
  expect(countOf('planWithdrawn')).toBe(1);
});
