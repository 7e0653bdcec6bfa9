import { findJobOfPlan, jobsByPlan } from '../../../db/store/jobs';
import { findPlanScenario, listPlans as listPlanRows } from '../../../db/store/plans';
import {
  buildPlan,
  checkTarget,
  getPlan,
  getPlanDefaults,
  getPlanScenario,
  listPlans,
  withdrawPlan as withdrawPlanContract,
} from '../../../src/contract/plans';
import { memberEndpoint } from '../../http/endpoint';
import { requireField } from '../fields/service';
import { presentJob, requireJob } from '../jobs/service';
import { answerTarget } from './check-target';
import { planDefaults } from './defaults';
import { planDetail } from './detail';
import { mayBuildPlan, mayReadPlans, mayWithdrawPlan } from './policy';
import { presentSummary } from './present';
import { requestPlan, requirePlan, withdrawPlan } from './service';

export const planEndpoints = {
  listPlans: memberEndpoint(listPlans, {
    load: ({ context, params }) => listPlanRows(context.database.db, params.fieldId),
    policy: mayReadPlans,
    act: ({ context, who, subject }) => {
      const jobs = jobsByPlan(context.database.db, who.fieldId);
      return {
        plans: subject.map((found) => presentSummary(found, jobs.get(found.plan.id))),
        can: { buildPlan: mayBuildPlan(who).allowed },
      };
    },
  }),
  getPlanDefaults: memberEndpoint(getPlanDefaults, {
    load: ({ context, params }) => requireField(context, params.fieldId),
    // The form is for those who may send it; the others are told why before they fill it in.
    policy: mayBuildPlan,
    act: ({ context, subject }) => planDefaults(context, subject),
  }),
  checkTarget: memberEndpoint(checkTarget, {
    load: ({ context, params }) => requireField(context, params.fieldId),
    policy: mayReadPlans,
    act: ({ context, subject, body }) => answerTarget(context, subject, body),
  }),
  buildPlan: memberEndpoint(buildPlan, {
    load: ({ context, params }) => requireField(context, params.fieldId),
    policy: mayBuildPlan,
    act: ({ context, who, subject, body }) => {
      const { planId, jobId } = requestPlan(context, subject, who, body);
      return { planId, job: presentJob(requireJob(context, subject.id, jobId), who.roles) };
    },
  }),
  getPlan: memberEndpoint(getPlan, {
    load: ({ context, params }) => ({
      field: requireField(context, params.fieldId),
      found: requirePlan(context, params.fieldId, params.planId),
    }),
    policy: mayReadPlans,
    act: ({ context, who, subject }) => planDetail(context, subject.field, subject.found, who.roles),
  }),
  withdrawPlan: memberEndpoint(withdrawPlanContract, {
    load: ({ context, params }) => requirePlan(context, params.fieldId, params.planId),
    policy: mayWithdrawPlan,
    act: ({ context, who, subject }) => {
      withdrawPlan(context, who, subject);
      const { db } = context.database;
      return presentSummary(
        requirePlan(context, who.fieldId, subject.plan.id),
        findJobOfPlan(db, subject.plan.id),
      );
    },
  }),
  getPlanScenario: memberEndpoint(getPlanScenario, {
    load: ({ context, params }) => requirePlan(context, params.fieldId, params.planId),
    policy: mayReadPlans,
    act: ({ context, subject }) => JSON.parse(findPlanScenario(context.database.db, subject.plan.id)!),
  }),
};
