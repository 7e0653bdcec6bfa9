import type { FieldRow } from '../../../db/store/fields';
import { findJobOfPlan } from '../../../db/store/jobs';
import { findPlanResult, type PlanWithBuilder } from '../../../db/store/plans';
import type { Scenario } from '../../../models/scenario/types';
import { planRequest, type PlanDetail } from '../../../src/contract/plans';
import type { Role } from '../../../src/contract/enums';
import type { Context } from '../../context';
import { addWeeks } from '../../time/local-week';
import { pastWeeks } from '../fields/service';
import { planOffers } from './policy';
import { presentSummary } from './present';
import { presentResult } from './present-result';

export function planDetail(
  context: Context,
  field: FieldRow,
  found: PlanWithBuilder,
  roles: readonly Role[],
): PlanDetail {
  const { db } = context.database;
  const { plan } = found;
  const { notes, lookAheadWeeks, objective } = plan;
  const job = findJobOfPlan(db, plan.id);
  const scenario = JSON.parse(plan.scenario) as Scenario;
  const stored = findPlanResult(db, plan.id);
  const startsAt = (week: number) => addWeeks(plan.firstWeekStartsAt, week - 1, field.timeZone);
  return {
    plan: { ...presentSummary(found, job), notes, lookAheadWeeks, objective },
    timeZone: field.timeZone,
    request: planRequest.parse(JSON.parse(plan.request)),
    pastWeeks: pastWeeks(context, field),
    backgroundEventsPerYear: scenario.seismicity.backgroundEventsPerYear,
    result: stored ? presentResult(scenario, JSON.parse(stored.result), plan.inputHash, startsAt) : null,
    can: planOffers({ roles }, { state: plan.state, jobState: job?.state ?? null }),
  };
}
