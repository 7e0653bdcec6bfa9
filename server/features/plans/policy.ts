import type { JobState, PlanState, Role } from '../../../src/contract/enums';
import { no, yes, type Decision } from '../../http/decision';

interface Roles {
  readonly roles: readonly Role[];
}

/** Every role of a field may read its plans. */
export const mayReadPlans = (_who: Roles): Decision => yes;

/** Plans are the field engineer's work. */
export const mayBuildPlan = (who: Roles): Decision =>
  who.roles.includes('fieldEngineer') ? yes : no('Only a field engineer builds plans.');

/** Only a draft can be taken back, and only by a field engineer. The state itself is guarded again when it changes. */
export const mayWithdrawPlan = (who: Roles): Decision =>
  who.roles.includes('fieldEngineer') ? yes : no('Only a field engineer withdraws plans.');

/** What the screen offers on one plan. */
export function planOffers(who: Roles, plan: { state: PlanState; jobState: JobState | null }) {
  const builds = mayBuildPlan(who).allowed;
  const running = plan.jobState === 'queued' || plan.jobState === 'running';
  return {
    cancel: builds && running,
    buildAgain: builds && !running,
    withdraw: mayWithdrawPlan(who).allowed && plan.state === 'draft' && !running,
  };
}
