import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';

import { insertMembership } from '../../db/store/people';
import { addWeeks, weekStartOf } from '../../server/time/local-week';
import { mayListFields, mayReadField } from '../../server/features/fields/policy';
import { mayReadSelf } from '../../server/features/people/policy';
import { ROLES } from '../../src/contract/enums';
import { addEmptyField, addPerson } from '../support/extra-people';
import { hasEnded, requestPlan, waitForJob } from '../support/plan-requests';
import { startTestServer, type Caller, type TestServer } from '../support/test-server';
import { SMALL_FIELD_ZONE } from '../support/small-field';

test.each(ROLES)('policy: a %s reads the field, the list and themselves', (role) => {
  const who = { id: 'p', name: 'P', email: 'p@example.com', fieldId: 'f', roles: [role] };
  expect([mayReadField(who), mayListFields(who), mayReadSelf(who)].map(({ allowed }) => allowed)).toEqual([
    true,
    true,
    true,
  ]);
});

describe('the fields of a person', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.stop());

  test('are those they are a member of, with every role they hold there', async () => {
    const bareFieldId = addEmptyField(server, 'Another Moor');
    const person = await addPerson(server, { roles: ['hseOfficer', 'productionLead'] });
    expect((await person.get('/api/fields')).body.fields).toMatchObject([
      {
        id: server.fieldId,
        name: 'Small Fen',
        roles: expect.arrayContaining(['hseOfficer', 'productionLead']),
      },
    ]);
    const { db } = server.context.database;
    insertMembership(db, { fieldId: bareFieldId, personId: person.id, role: 'administrator', createdAt: 0 });
    const { fields } = (await person.get('/api/fields')).body;
    expect(fields.map((field: any) => [field.name, field.timeZone])).toEqual([
      ['Another Moor', 'Europe/London'],
      ['Small Fen', 'Europe/Berlin'],
    ]);
  });

  test('are none for somebody who was not given any', async () => {
    const person = await addPerson(server);
    expect((await person.get('/api/fields')).body).toEqual({ fields: [] });
    expect((await person.get('/api/me')).body.memberships).toEqual([]);
  });

  test('may be bare: no model, no readings, no invented numbers', async () => {
    const fieldId = addEmptyField(server);
    const person = await addPerson(server, { roles: ['fieldEngineer'], fieldId });
    const { body } = await person.get(`/api/fields/${fieldId}`);
    expect(body).toMatchObject({
      wells: [],
      pastWeeks: [],
      newestReadingAt: null,
      newestEventAt: null,
      change: 'Nothing has been measured yet.',
      runningJobId: null,
    });
    expect(body.steps[0]).toMatchObject({ step: 'readings', state: 'now' });
    expect(body.steps[3]).toMatchObject({ step: 'build', state: 'next' });
  });
});

describe('this week', () => {
  let server: TestServer;
  let engineer: Caller;
  beforeEach(async () => {
    server = await startTestServer();
    engineer = await server.as('fieldEngineer');
    return () => server.stop();
  });
  const week = async (caller = engineer) => (await caller.get(`/api/fields/${server.fieldId}`)).body;
  const nowWeek = weekStartOf(Date.now(), SMALL_FIELD_ZONE);

  test('shows the wells with their last metered rates, monitoring wells without', async () => {
    const { wells } = await week();
    const rates = wells.map((well: any) => [well.name, well.kind, well.control, well.lastRateM3PerS]);
    expect(rates).toEqual([
      ['P-1', 'producer', true, 0.04],
      ['I-1', 'injector', true, 0.02],
      ['I-2', 'injector', true, 0.012],
      ['I-3', 'injector', false, 0.008],
      ['M-1', 'monitor', false, null],
    ]);
    expect(wells[0].lastRateAt).toBe(addWeeks(nowWeek, -1, SMALL_FIELD_ZONE));
  });

  test('counts each past week against background', async () => {
    const { pastWeeks, backgroundEventsPerYear } = await week();
    expect(backgroundEventsPerYear).toBe(24);
    expect(pastWeeks).toHaveLength(8);
    expect(pastWeeks.map(({ observedEvents }: any) => observedEvents)).toEqual(Array(8).fill(1));
    // One event in a week against 24 a year of 365.25 days: 365.25 / 7 / 24, by hand.
    expect(pastWeeks[0].rateMultiple).toBeCloseTo(2.174107, 5);
    // 0.04 m³/s · 4.6e8 J/m³ · 604 800 s
    expect(pastWeeks[0].heatJ / 1.112832e13).toBeCloseTo(1, 9);
  });

  test('an event below completeness or in the week in progress is not counted', async () => {
    const { sqlite } = server.context.database;
    sqlite.prepare(`update seismic_events set magnitude = 0.4 where public_id = 'small-7'`).run();
    sqlite.prepare(`update seismic_events set occurred_at = ? where public_id = 'small-6'`).run(nowWeek);
    const { pastWeeks, newestEventAt } = await week();
    expect(pastWeeks.map(({ observedEvents }: any) => observedEvents)).toEqual([1, 1, 1, 1, 1, 1, 0, 0]);
    expect(newestEventAt).toBe(nowWeek);
  });

  test('the next thing is to build the plan, and only the engineer is told to', async () => {
    const lead = await server.as('productionLead');
    expect((await week()).field.waitsForMe).toMatch(/^Build the plan for the week of /);
    expect((await week()).can).toEqual({ buildPlan: true });
    expect((await week(lead)).field.waitsForMe).toBeNull();
    expect((await week(lead)).can).toEqual({ buildPlan: false });
    expect((await week()).steps.map(({ step, state }: any) => `${step} ${state}`)).toEqual([
      'readings done',
      'modelCheck notUsed',
      'refit notUsed',
      'build now',
      'review notUsed',
      'issue notUsed',
      'follow notUsed',
      'report notUsed',
    ]);
  });

  test('a plan for the coming week settles it, until it is withdrawn', async () => {
    const { planId, jobId } = await requestPlan(server, engineer);
    await waitForJob(server, jobId, hasEnded);
    const after = await week();
    expect(after.field).toMatchObject({
      waitsForMe: null,
      newestPlan: { id: planId, number: 1, rateMultiple: 1.1 },
    });
    expect(after.steps[3]).toMatchObject({ step: 'build', state: 'done' });
    await engineer.post(`/api/fields/${server.fieldId}/plans/${planId}/withdraw`);
    expect((await week()).field).toMatchObject({
      newestPlan: null,
      waitsForMe: expect.stringMatching(/^Build/),
    });
  });

  test('missing readings are named', async () => {
    const lastWeek = addWeeks(nowWeek, -1, SMALL_FIELD_ZONE);
    server.context.database.sqlite
      .prepare('delete from metered_rates where week_starts_at = ?')
      .run(lastWeek);
    const { steps } = await week();
    expect(steps[0]).toMatchObject({
      state: 'now',
      sentence: expect.stringMatching(/newer ones are missing/),
    });
    expect(steps[3]).toMatchObject({ state: 'next' });
  });
});
