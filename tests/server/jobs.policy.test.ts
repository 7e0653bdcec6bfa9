import { expect, test } from 'vitest';

import { jobOffers, mayCancelJob, mayReadJobs } from '../../server/features/jobs/policy';
import { JOB_STATES, ROLES } from '../../src/contract/enums';

/** Who is offered to stop a job in which state. */
const CANCEL = {
  //              queued running done   failed cancelled
  fieldEngineer: [true, true, false, false, false],
  productionLead: [false, false, false, false, false],
  hseOfficer: [false, false, false, false, false],
  administrator: [false, false, false, false, false],
} as const;

test('the table names every role and every state', () => {
  expect(Object.keys(CANCEL).sort()).toEqual([...ROLES].sort());
  for (const row of Object.values(CANCEL)) expect(row).toHaveLength(JOB_STATES.length);
});

test.each(
  ROLES.flatMap((role) => JOB_STATES.map((state, index) => [role, state, CANCEL[role][index]!] as const)),
)('%s, a %s job: cancel %s', (role, state, cancel) => {
  expect(jobOffers({ roles: [role] }, state).cancel).toBe(cancel);
});

test.each(ROLES.map((role) => [role, role === 'fieldEngineer'] as const))(
  '%s reads jobs; stops one: %s',
  (role, stops) => {
    expect(mayReadJobs({ roles: [role] }).allowed).toBe(true);
    expect(mayCancelJob({ roles: [role] }).allowed).toBe(stops);
  },
);
