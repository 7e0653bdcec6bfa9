import type { JobState, Role } from '../../../src/contract/enums';
import { no, yes, type Decision } from '../../http/decision';

interface Roles {
  readonly roles: readonly Role[];
}

/** Every role of a field may see what runs. */
export const mayReadJobs = (_who: Roles): Decision => yes;

/** Whoever builds plans may stop one. That it still runs is guarded when the state changes. */
export const mayCancelJob = (who: Roles): Decision =>
  who.roles.includes('fieldEngineer') ? yes : no('Only a field engineer stops a job.');

export const jobOffers = (who: Roles, state: JobState) => ({
  cancel: mayCancelJob(who).allowed && (state === 'queued' || state === 'running'),
});
