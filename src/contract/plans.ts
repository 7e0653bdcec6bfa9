import { z } from 'zod';

import { at, id, person } from './common';
import { defineEndpoint } from './define-endpoint';
import { JOB_STATES, OBJECTIVES, PLAN_STATES, WELL_KINDS } from './enums';
import { job } from './jobs';

const fieldParams = z.object({ fieldId: id });
const planParams = z.object({ fieldId: id, planId: id });

export const planSummary = z.object({
  id,
  number: z.number().int(),
  name: z.string(),
  state: z.enum(PLAN_STATES),
  builtBy: person,
  createdAt: at,
  firstWeekStartsAt: at,
  weeks: z.number().int(),
  jobId: id.nullable(),
  jobState: z.enum(JOB_STATES).nullable(),
  /** Null until the plan has been computed. */
  outcome: z
    .object({ rateMultiple: z.number(), heatJ: z.number(), heatTargetJ: z.number(), gap: z.number() })
    .nullable(),
});
export type PlanSummary = z.output<typeof planSummary>;

export const listPlans = defineEndpoint({
  id: 'listPlans',
  method: 'GET',
  path: '/api/fields/:fieldId/plans',
  summary: 'Plans of a field, newest first',
  access: 'member',
  params: fieldParams,
  reply: z.object({ plans: z.array(planSummary), can: z.object({ buildPlan: z.boolean() }) }),
});

/** What the person asks for. One target holds for all weeks. */
export const planRequest = z.object({
  name: z.string().trim().min(1).max(80),
  firstWeekStartsAt: at,
  weeks: z.number().int().min(1).max(26),
  lookAheadWeeks: z.number().int().min(0).max(52),
  objective: z.enum(OBJECTIVES),
  /** J per week, one per week of the plan. */
  heatTargetJPerWeek: z.array(z.number().positive().max(1e16)).min(1).max(26),
  /** How much above the target a week may deliver, as a fraction of it. */
  heatBand: z.number().min(0.001).max(0.5),
  notes: z.string().max(2000).default(''),
});
export type PlanRequest = z.output<typeof planRequest>;

export const getPlanDefaults = defineEndpoint({
  id: 'getPlanDefaults',
  method: 'GET',
  path: '/api/fields/:fieldId/plan-defaults',
  summary: 'A plan request filled in from last week and the targets calendar',
  access: 'member',
  params: fieldParams,
  reply: z.object({
    request: planRequest,
    /** Heat the last measured rates deliver in a week. */
    lastWeekHeatJ: z.number(),
    /** What a typical run takes on this machine, from earlier jobs; null before the first. */
    typicalSeconds: z.number().nullable(),
  }),
});

/** Answers while somebody types: can the first week's target be met inside bounds, ramps and balance? */
export const checkTarget = defineEndpoint({
  id: 'checkTarget',
  method: 'POST',
  path: '/api/fields/:fieldId/check-target',
  summary: 'Whether an energy target can be met, week by week, by rates alone',
  access: 'member',
  params: fieldParams,
  body: planRequest.pick({ firstWeekStartsAt: true, weeks: true, heatTargetJPerWeek: true, heatBand: true }),
  reply: z.object({
    feasible: z.boolean(),
    /** The most heat each week allows by bounds, outages, ramps and balance, J. */
    mostHeatJ: z.array(z.number()),
    leastHeatJ: z.array(z.number()),
    /** Plain sentence, e.g. "Week 1 can deliver at most 3,410 MWh: 120 MWh short of the target." */
    sentence: z.string(),
  }),
});

export const buildPlan = defineEndpoint({
  id: 'buildPlan',
  method: 'POST',
  path: '/api/fields/:fieldId/plans',
  summary: 'Ask for a plan; a job computes it',
  access: 'member',
  params: fieldParams,
  body: planRequest,
  status: 202,
  reply: z.object({ planId: id, job }),
  errors: ['PLAN_WEEK_STARTED', 'TARGET_COUNT', 'NO_MODEL', 'NO_READINGS'],
});

const weekForecast = z.object({
  /** 1-based, the plan's weeks first, then the look-ahead. */
  week: z.number().int(),
  startsAt: at,
  lookAhead: z.boolean(),
  expectedEvents: z.number(),
  rateMultiple: z.number(),
  zones: z.array(
    z.object({ name: z.string(), expectedEvents: z.number(), rateMultiple: z.number().nullable() }),
  ),
  wells: z.array(
    z.object({
      name: z.string(),
      bottomHoleEndPa: z.number(),
      bottomHoleMinPa: z.number(),
      bottomHoleMaxPa: z.number(),
    }),
  ),
  observers: z.array(z.object({ name: z.string(), overpressurePa: z.number() })),
  heatJ: z.number(),
  heatTargetJ: z.number().nullable(),
  heatCeilingJ: z.number().nullable(),
  /** Chance of at least one event of magnitude ≥ `chanceMagnitude` in the week. */
  chance: z.number(),
});

const alternative = z.object({
  expectedEvents: z.number(),
  rateMultiple: z.number(),
  /** Whether it meets the energy targets, and the limits it breaks, in words. */
  meetsTargets: z.boolean(),
  breaks: z.array(z.string()),
  weeklyRateMultiple: z.array(z.number()),
  weeklyHeatJ: z.array(z.number()),
});

export const planResult = z.object({
  wells: z.array(
    z.object({
      name: z.string(),
      kind: z.enum(WELL_KINDS),
      control: z.boolean(),
      minRateM3PerS: z.number().nullable(),
      maxRateM3PerS: z.number().nullable(),
      maxChangeM3PerSPerWeek: z.number().nullable(),
      minPressurePa: z.number().nullable(),
      maxPressurePa: z.number().nullable(),
      lastRateM3PerS: z.number(),
      weeklyM3PerS: z.array(z.number()),
      /** Per week: what holds the rate where it is. */
      weeklyState: z.array(z.enum(['free', 'atMin', 'atMax', 'atRamp', 'outage', 'fixed'])),
    }),
  ),
  weeks: z.array(weekForecast),
  /** Over the plan's weeks and the look-ahead. */
  totals: z.object({
    expectedEvents: z.number(),
    backgroundEvents: z.number(),
    rateMultiple: z.number(),
    heatJ: z.number(),
  }),
  /** Over the plan's own weeks alone. */
  planWeeks: z.object({ expectedEvents: z.number(), rateMultiple: z.number(), heatJ: z.number() }),
  lowerBound: z.number(),
  gap: z.number(),
  binding: z.array(
    z.object({
      limit: z.string(),
      well: z.string().optional(),
      week: z.number().int().optional(),
      price: z.number(),
      unit: z.string(),
      /** The same in people's units, a full sentence. */
      sentence: z.string(),
    }),
  ),
  comparison: z.object({ hold: alternative, evenSplit: alternative.nullable() }),
  check: z.object({ expectedEvents: z.number(), relativeDifference: z.number() }),
  /** True where a forecast lies below background because rates were cut below history (stress shadow). */
  stressShadow: z.boolean(),
  chanceMagnitude: z.number(),
  rounds: z.number().int(),
  seconds: z.number(),
  modelVersion: z.string(),
  inputHash: z.string(),
});
export type PlanResult = z.output<typeof planResult>;

export const getPlan = defineEndpoint({
  id: 'getPlan',
  method: 'GET',
  path: '/api/fields/:fieldId/plans/:planId',
  summary: 'One plan with its rates and forecast',
  access: 'member',
  params: planParams,
  reply: z.object({
    plan: planSummary.extend({
      notes: z.string(),
      lookAheadWeeks: z.number().int(),
      objective: z.enum(OBJECTIVES),
    }),
    timeZone: z.string(),
    request: planRequest,
    /** Observed past weeks, for the left part of the charts. */
    pastWeeks: z.array(
      z.object({ weekStartsAt: at, observedEvents: z.number().int(), rateMultiple: z.number() }),
    ),
    backgroundEventsPerYear: z.number(),
    result: planResult.nullable(),
    can: z.object({ cancel: z.boolean(), buildAgain: z.boolean(), withdraw: z.boolean() }),
  }),
});
export type PlanDetail = z.output<typeof getPlan.reply>;

export const withdrawPlan = defineEndpoint({
  id: 'withdrawPlan',
  method: 'POST',
  path: '/api/fields/:fieldId/plans/:planId/withdraw',
  summary: 'Take a draft out of the list of live plans; it stays on record',
  access: 'member',
  params: planParams,
  reply: planSummary,
  errors: ['PLAN_NOT_DRAFT'],
});

/** The scenario file that replays the plan to the same numbers. */
export const getPlanScenario = defineEndpoint({
  id: 'getPlanScenario',
  method: 'GET',
  path: '/api/fields/:fieldId/plans/:planId/scenario',
  summary: 'Everything the plan depends on, as a scenario file',
  access: 'member',
  params: planParams,
  reply: z.looseObject({ format: z.literal('stillfield-scenario/1') }),
});
