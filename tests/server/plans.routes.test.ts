import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from 'vitest';

import { listAudit } from '../../db/store/audit';
import { insertMembership } from '../../db/store/people';
import { addEmptyField } from '../support/extra-people';
import { hasEnded, nextWeek, planRequest, requestPlan, waitForJob } from '../support/plan-requests';
import { scriptedModel, startTestServer, type Caller, type TestServer } from '../support/test-server';
import { ScenarioError } from '../../models/errors';
import { readScenario } from '../../models/scenario/read-scenario';
import { addWeeks, weekStartOf } from '../../server/time/local-week';

const mondayIn = (timeZone: string) => addWeeks(weekStartOf(Date.now(), timeZone), 1, timeZone);

let server: TestServer;
let engineer: Caller;
let plans: string;

async function start(model = scriptedModel()): Promise<void> {
  server = await startTestServer({ model });
  engineer = await server.as('fieldEngineer');
  plans = `/api/fields/${server.fieldId}/plans`;
}

async function finishedPlan(): Promise<{ planId: string; jobId: string }> {
  const ids = await requestPlan(server, engineer);
  await waitForJob(server, ids.jobId, hasEnded);
  return ids;
}

describe('asking for a plan is refused', () => {
  beforeAll(() => start());
  afterAll(() => server.stop());

  test.each([
    ['weeks', { weeks: 0 }],
    ['weeks', { weeks: 27 }],
    ['weeks', { weeks: 2.5 }],
    ['lookAheadWeeks', { lookAheadWeeks: -1 }],
    ['heatBand', { heatBand: 0 }],
    ['name', { name: '   ' }],
    ['objective', { objective: 'loudest' as never }],
    ['heatTargetJPerWeek.0', { heatTargetJPerWeek: [-1] }],
    ['heatTargetJPerWeek', { heatTargetJPerWeek: [] }],
    ['firstWeekStartsAt', { firstWeekStartsAt: 'Monday' as never }],
  ])('422 names %s in %j', async (path, changes) => {
    const reply = await engineer.post(plans, planRequest(changes));
    expect(reply.status).toBe(422);
    expect(reply.body.error.fields.map((field: { path: string }) => field.path)).toEqual([path]);
  });

  test('422 where a week does not start on the local Monday', async () => {
    const reply = await engineer.post(plans, planRequest({ firstWeekStartsAt: nextWeek() + 3_600_000 }));
    expect(reply.status).toBe(422);
    expect(reply.body.error.fields[0].path).toBe('firstWeekStartsAt');
  });

  test('422 for a start more than 26 weeks ahead; the 26th is fine', async () => {
    expect((await engineer.post(plans, planRequest({ firstWeekStartsAt: nextWeek(27) }))).status).toBe(422);
    expect((await engineer.post(plans, planRequest({ firstWeekStartsAt: nextWeek(26) }))).status).toBe(202);
  });

  test('422 TARGET_COUNT for two targets in three weeks', async () => {
    const reply = await engineer.post(plans, planRequest({ heatTargetJPerWeek: [1e13, 1e13] }));
    expect([reply.status, reply.body.error.code]).toEqual([422, 'TARGET_COUNT']);
  });

  test('409 PLAN_WEEK_STARTED for the week in progress', async () => {
    const reply = await engineer.post(plans, planRequest({ firstWeekStartsAt: nextWeek(0) }));
    expect([reply.status, reply.body.error.code]).toEqual([409, 'PLAN_WEEK_STARTED']);
  });

  test('409 NO_MODEL for a field without an accepted model', async () => {
    const bareFieldId = addEmptyField(server);
    const { id: personId } = (await engineer.get('/api/me')).body;
    const { db } = server.context.database;
    insertMembership(db, { fieldId: bareFieldId, personId, role: 'fieldEngineer', createdAt: Date.now() });
    const request = planRequest({ firstWeekStartsAt: mondayIn('Europe/London') });
    const reply = await engineer.post(`/api/fields/${bareFieldId}/plans`, request);
    expect([reply.status, reply.body.error.code]).toEqual([409, 'NO_MODEL']);
  });

  test('nothing is written down for a refused plan', async () => {
    const listed = async () => (await engineer.get(plans)).body.plans.map(({ id }: { id: string }) => id);
    const before = await listed();
    await engineer.post(plans, planRequest({ firstWeekStartsAt: nextWeek(0) }));
    expect(await listed()).toEqual(before);
    const { db } = server.context.database;
    const asked = listAudit(db, server.fieldId).filter(({ event }) => event === 'planRequested');
    expect(asked).toHaveLength(before.length);
  });
});

describe('asking for a plan of a field that is not ready is refused', () => {
  afterEach(() => server.stop());

  test('409 NO_READINGS where nothing has been metered', async () => {
    await start();
    server.context.database.sqlite.exec('delete from metered_rates');
    const reply = await engineer.post(plans, planRequest());
    expect([reply.status, reply.body.error.code]).toEqual([409, 'NO_READINGS']);
  });

  test('422 with the paths where the field as set up cannot be planned for', async () => {
    const issues = [{ path: 'wells[0].skin', message: 'must be above -5' }];
    await start({
      ...scriptedModel(),
      readScenario: () => {
        throw new ScenarioError(issues);
      },
    });
    const reply = await engineer.post(plans, planRequest());
    expect([reply.status, reply.body.error.fields]).toEqual([422, issues]);
  });
});

describe('withdrawing is refused', () => {
  afterEach(() => server.stop());

  test('409 while the plan is being computed', async () => {
    await start(scriptedModel('slow'));
    const { planId } = await requestPlan(server, engineer);
    const reply = await engineer.post(`${plans}/${planId}/withdraw`);
    expect([reply.status, reply.body.error.code]).toEqual([409, 'PLAN_NOT_DRAFT']);
  });

  test('409 the second time', async () => {
    await start();
    const { planId } = await finishedPlan();
    expect((await engineer.post(`${plans}/${planId}/withdraw`)).body.state).toBe('withdrawn');
    const reply = await engineer.post(`${plans}/${planId}/withdraw`);
    expect([reply.status, reply.body.error.code]).toEqual([409, 'PLAN_NOT_DRAFT']);
  });
});

describe('a plan', () => {
  beforeEach(() => start());
  afterEach(() => server.stop());

  test('is asked for, computed and read, and every step is on record', async () => {
    const reply = await engineer.post(plans, planRequest({ name: '  Quiet December ' }));
    expect(reply.status).toBe(202);
    const { planId, job } = reply.body;
    await waitForJob(server, job.id, hasEnded);

    const detail = (await engineer.get(`${plans}/${planId}`)).body;
    expect(detail.plan).toMatchObject({
      number: 1,
      name: 'Quiet December',
      state: 'draft',
      jobState: 'done',
      builtBy: { name: 'Maren Oakhill' },
    });
    // One target was given: it holds for all three weeks.
    expect(detail.request.heatTargetJPerWeek).toEqual([1.1e13, 1.1e13, 1.1e13]);
    expect(detail.result.weeks).toHaveLength(5);
    expect(detail.result.weeks.map((week: any) => week.lookAhead)).toEqual([false, false, false, true, true]);
    expect(detail.result.weeks[0].startsAt).toBe(nextWeek());
    expect(detail.can).toEqual({ cancel: false, buildAgain: true, withdraw: true });

    const audit = listAudit(server.context.database.db, server.fieldId).slice(1);
    expect(audit.map(({ event, subjectId }) => [event, subjectId])).toEqual([
      ['planRequested', planId],
      ['planComputed', planId],
    ]);
  });

  test('is listed newest first, with what it came to', async () => {
    await finishedPlan();
    await finishedPlan();
    const { body } = await engineer.get(plans);
    expect(body.plans.map(({ number }: { number: number }) => number)).toEqual([2, 1]);
    expect(body.plans[0].outcome).toMatchObject({ heatTargetJ: 3.3e13, gap: 0.001 });
    expect(body.can).toEqual({ buildPlan: true });
  });

  test('offers nothing to change to somebody who only reads it', async () => {
    const { planId } = await finishedPlan();
    const lead = await server.as('productionLead');
    expect((await lead.get(plans)).body.can).toEqual({ buildPlan: false });
    expect((await lead.get(`${plans}/${planId}`)).body.can).toEqual({
      cancel: false,
      buildAgain: false,
      withdraw: false,
    });
  });

  test('of another field is not found under this one', async () => {
    const { planId } = await finishedPlan();
    const bareFieldId = addEmptyField(server);
    const { id: personId } = (await engineer.get('/api/me')).body;
    const { db } = server.context.database;
    insertMembership(db, { fieldId: bareFieldId, personId, role: 'fieldEngineer', createdAt: Date.now() });
    expect((await engineer.get(`/api/fields/${bareFieldId}/plans/${planId}`)).status).toBe(404);
    expect((await engineer.get(`/api/fields/${bareFieldId}`)).status).toBe(200);
  });

  test('gives the scenario that it was computed from, which the command line reads', async () => {
    const { planId } = await finishedPlan();
    const { body } = await engineer.get(`${plans}/${planId}/scenario`);
    const scenario = readScenario(body);
    expect(scenario.wells.map(({ name }) => name)).toEqual(['P-1', 'I-1', 'I-2', 'I-3']);
    // Seconds before the plan's start: eight metered weeks and the one in progress.
    expect(scenario.history[0]!.steps[0]!.fromS / 604_800).toBeCloseTo(-9, 1);
    // Asked for in the second planned week, where the well is out.
    expect(scenario.wells[2]!.outages).toEqual([{ fromWeek: 2, toWeek: 2 }]);
  });

  test('the same again takes the result over without computing', async () => {
    const first = await finishedPlan();
    const second = await finishedPlan();
    const job = (await engineer.get(`/api/fields/${server.fieldId}/jobs/${second.jobId}`)).body;
    expect(job).toMatchObject({ state: 'done', attempts: 0 });
    expect(job.step).toMatch(/earlier run/);
    const result = async (planId: string) => (await engineer.get(`${plans}/${planId}`)).body.result;
    expect(await result(second.planId)).toEqual(await result(first.planId));
  });

  test('with other numbers is computed anew', async () => {
    await finishedPlan();
    const { jobId } = await requestPlan(server, engineer, { heatTargetJPerWeek: [1.2e13] });
    await waitForJob(server, jobId, hasEnded);
    const job = (await engineer.get(`/api/fields/${server.fieldId}/jobs/${jobId}`)).body;
    expect(job.attempts).toBe(1);
  });
});

describe('the form', () => {
  beforeAll(() => start());
  afterAll(() => server.stop());

  test('is filled in from the calendar and last week', async () => {
    const { body } = await engineer.get(`/api/fields/${server.fieldId}/plan-defaults`);
    expect(body.request).toMatchObject({ firstWeekStartsAt: nextWeek(), objective: 'quietest' });
    expect(body.request.heatTargetJPerWeek).toHaveLength(body.request.weeks);
    expect(new Set(body.request.heatTargetJPerWeek)).toEqual(new Set([1.1e13]));
    // 0.04 m³/s · 4.6e8 J/m³ · 604 800 s, by hand.
    expect(body.lastWeekHeatJ).toBeCloseTo(1.112832e13, -8);
    expect(body.typicalSeconds).toBeNull();
  });

  test('is a request that the server takes', async () => {
    const { body } = await engineer.get(`/api/fields/${server.fieldId}/plan-defaults`);
    expect((await engineer.post(plans, body.request)).status).toBe(202);
  });

  test.each([
    ['within reach', 1.1e13, true, /every target/],
    ['above what the rates give', 1.7e13, false, /^Week 1 can deliver at most 4,444 MWh: 278 MWh short/],
    ['below what has to run', 2e12, false, /^Week 1 delivers at least 833 MWh: 267 MWh more/],
  ])('says whether a target is %s', async (_case, target, feasible, sentence) => {
    const {
      name: _name,
      notes: _notes,
      objective: _objective,
      lookAheadWeeks: _weeks,
      ...horizon
    } = planRequest();
    const reply = await engineer.post(`/api/fields/${server.fieldId}/check-target`, {
      ...horizon,
      heatTargetJPerWeek: [target],
    });
    expect(reply.body.feasible).toBe(feasible);
    expect(reply.body.sentence).toMatch(sentence);
    expect(reply.body.mostHeatJ).toEqual([1.6e13, 1.6e13, 1.6e13]);
  });

  test('a target is checked by the rules of the request itself', async () => {
    const { name: _name, ...horizon } = planRequest({ firstWeekStartsAt: nextWeek(0) });
    const reply = await engineer.post(`/api/fields/${server.fieldId}/check-target`, horizon);
    expect([reply.status, reply.body.error.code]).toEqual([409, 'PLAN_WEEK_STARTED']);
  });
});
