import * as fields from './fields';
import * as health from './health';
import * as jobs from './jobs';
import * as people from './people';
import * as plans from './plans';

/** Every endpoint there is; the server binds all of them or fails at start. */
export const endpoints = {
  getHealth: health.getHealth,
  getOpenApi: health.getOpenApi,
  getMe: people.getMe,
  listDemoSignIns: people.listDemoSignIns,
  listFields: fields.listFields,
  getFieldWeek: fields.getFieldWeek,
  listPlans: plans.listPlans,
  getPlanDefaults: plans.getPlanDefaults,
  checkTarget: plans.checkTarget,
  buildPlan: plans.buildPlan,
  getPlan: plans.getPlan,
  withdrawPlan: plans.withdrawPlan,
  getPlanScenario: plans.getPlanScenario,
  listJobs: jobs.listJobs,
  getJob: jobs.getJob,
  cancelJob: jobs.cancelJob,
  watchJob: jobs.watchJob,
} as const;

export type EndpointId = keyof typeof endpoints;
