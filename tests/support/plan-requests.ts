import type { PlanRequest } from '../../src/contract/plans';
import { addWeeks, weekStartOf } from '../../server/time/local-week';
import { SMALL_FIELD_ZONE } from './small-field';
import type { Caller, TestServer } from './test-server';

export const nextWeek = (weeks = 1, nowAt = Date.now()) =>
  addWeeks(weekStartOf(nowAt, SMALL_FIELD_ZONE), weeks, SMALL_FIELD_ZONE);

/** A plan that can be asked for; state what matters. */
export function planRequest(changes: Partial<PlanRequest> = {}): PlanRequest {
  return {
    name: 'Quiet December',
    firstWeekStartsAt: nextWeek(),
    weeks: 3,
    lookAheadWeeks: 2,
    objective: 'quietest',
    heatTargetJPerWeek: [1.1e13],
    heatBand: 0.02,
    notes: '',
    ...changes,
  };
}

/** Asks for a plan and gives the identifiers it got. */
export async function requestPlan(
  server: TestServer,
  engineer: Caller,
  changes: Partial<PlanRequest> = {},
): Promise<{ planId: string; jobId: string }> {
  const reply = await engineer.post(`/api/fields/${server.fieldId}/plans`, planRequest(changes));
  if (reply.status !== 202) throw new Error(`no plan: ${JSON.stringify(reply.body)}`);
  return { planId: reply.body.planId, jobId: reply.body.job.id };
}

/** Waits until a job is as wanted, told by the server's own events and not by a clock. */
export async function waitForJob(
  server: TestServer,
  jobId: string,
  wanted: (job: { state: string; progress: number }) => boolean,
): Promise<void> {
  const { jobs, database } = server.context;
  const read = () =>
    database.sqlite.prepare('select state, progress from jobs where id = ?').get(jobId) as {
      state: string;
      progress: number;
    };
  await new Promise<void>((done) => {
    const look = () => {
      if (!wanted(read())) return;
      stop();
      done();
    };
    const stop = jobs.onChange(jobId, look);
    look();
  });
}

export const hasEnded = (job: { state: string }) => ['done', 'failed', 'cancelled'].includes(job.state);
