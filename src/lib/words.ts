/** Closed lists of the contract in people's words. */
import type { JobState, PlanState, Role } from '../contract/enums';

export const ROLE_NAMES: Record<Role, string> = {
  fieldEngineer: 'Field engineer',
  productionLead: 'Production lead',
  hseOfficer: 'HSE officer',
  administrator: 'Administrator',
};

export const PLAN_STATE_NAMES: Record<PlanState, string> = {
  draft: 'Draft',
  inReview: 'In review',
  signed: 'Signed',
  issued: 'Issued',
  closed: 'Closed',
  returned: 'Returned',
  withdrawn: 'Withdrawn',
};

export const JOB_STATE_NAMES: Record<JobState, string> = {
  queued: 'Waiting',
  running: 'Running',
  done: 'Done',
  failed: 'Failed',
  cancelled: 'Cancelled',
};

/** Still going on. */
export const isOpenJob = (state: JobState): boolean => state === 'queued' || state === 'running';
