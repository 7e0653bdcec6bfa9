import { describe, expect, test } from 'vitest';

import { mayBuildPlan, mayReadPlans, mayWithdrawPlan, planOffers } from '../../server/features/plans/policy';
import { JOB_STATES, PLAN_STATES, ROLES, type JobState, type PlanState } from '../../src/contract/enums';

const WHO = ['fieldEngineer', 'productionLead', 'hseOfficer', 'administrator'] as const;

test('the tables below name every role', () => {
  expect([...WHO].sort()).toEqual([...ROLES].sort());
});

describe.each([
  // role, read, build, withdraw
  ['fieldEngineer', true, true, true],
  ['productionLead', true, false, false],
  ['hseOfficer', true, false, false],
  ['administrator', true, false, false],
] as const)('%s', (role, read, build, withdraw) => {
  test(`read ${read}, build ${build}, withdraw ${withdraw}`, () => {
    const who = { roles: [role] };
    expect(mayReadPlans(who).allowed).toBe(read);
    expect(mayBuildPlan(who).allowed).toBe(build);
    expect(mayWithdrawPlan(who).allowed).toBe(withdraw);
  });
});

test('a refusal says why, and a second role counts as much as the first', () => {
  expect(mayBuildPlan({ roles: ['hseOfficer'] })).toEqual({
    allowed: false,
    reason: 'Only a field engineer builds plans.',
  });
  expect(mayBuildPlan({ roles: ['hseOfficer', 'fieldEngineer'] }).allowed).toBe(true);
});

type Offers = ReturnType<typeof planOffers>;
const C = 'cancel';
const B = 'buildAgain';
const W = 'withdraw';
/** What a field engineer is offered; columns are the states of the plan's job, in the order of `JOB_COLUMNS`. */
const JOB_COLUMNS = ['queued', 'running', 'done', 'failed', 'cancelled', null] as const;
const ENGINEER: Record<PlanState, string[][]> = {
  draft: [[C], [C], [B, W], [B, W], [B, W], [B, W]],
  inReview: [[C], [C], [B], [B], [B], [B]],
  signed: [[C], [C], [B], [B], [B], [B]],
  issued: [[C], [C], [B], [B], [B], [B]],
  closed: [[C], [C], [B], [B], [B], [B]],
  returned: [[C], [C], [B], [B], [B], [B]],
  withdrawn: [[C], [C], [B], [B], [B], [B]],
};

const cells = PLAN_STATES.flatMap((state) =>
  JOB_COLUMNS.map((jobState, column) => [state, jobState, ENGINEER[state][column]!] as const),
);
const offered = (offers: Offers) => Object.entries(offers).flatMap(([action, is]) => (is ? [action] : []));

test('the table below has a column for every state of a job', () => {
  expect(JOB_COLUMNS.slice(0, -1)).toEqual([...JOB_STATES]);
});

test.each(cells)('a %s plan whose job is %s offers an engineer %j', (state, jobState, actions) => {
  expect(offered(planOffers({ roles: ['fieldEngineer'] }, { state, jobState })).sort()).toEqual(
    [...actions].sort(),
  );
});

test.each(WHO.slice(1).flatMap((role) => cells.map(([state, jobState]) => [role, state, jobState] as const)))(
  'a %s is offered nothing on a %s plan whose job is %s',
  (role, state, jobState: JobState | null) => {
    expect(offered(planOffers({ roles: [role] }, { state, jobState }))).toEqual([]);
  },
);
