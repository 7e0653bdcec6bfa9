import { z } from 'zod';

import { at, id } from './common';
import { defineEndpoint } from './define-endpoint';
import { PLAN_STATES, ROLES, WELL_KINDS } from './enums';

export const fieldCard = z.object({
  id,
  name: z.string(),
  place: z.string(),
  roles: z.array(z.enum(ROLES)),
  /** Start of the week in progress (local Monday 00:00 as a UTC moment). */
  weekStartsAt: at,
  timeZone: z.string(),
  /** The newest finished plan: its forecast over its own weeks. */
  newestPlan: z
    .object({
      id,
      number: z.number().int(),
      state: z.enum(PLAN_STATES),
      rateMultiple: z.number(),
      heatJ: z.number(),
      heatTargetJ: z.number(),
    })
    .nullable(),
  /** What waits for the signed-in person, one sentence, or null. */
  waitsForMe: z.string().nullable(),
});

export const listFields = defineEndpoint({
  id: 'listFields',
  method: 'GET',
  path: '/api/fields',
  summary: 'The fields the signed-in person is a member of',
  access: 'signedIn',
  reply: z.object({ fields: z.array(fieldCard) }),
});
export type FieldCard = z.output<typeof fieldCard>;

export const wellSummary = z.object({
  id,
  name: z.string(),
  kind: z.enum(WELL_KINDS),
  /** False for a well that the plan may not move. */
  control: z.boolean(),
  xM: z.number(),
  yM: z.number(),
  lastRateM3PerS: z.number().nullable(),
  lastRateAt: at.nullable(),
});

/** One past week as it was measured and counted. */
export const pastWeek = z.object({
  weekStartsAt: at,
  observedEvents: z.number().int(),
  /** observed / (background rate · 7 d) */
  rateMultiple: z.number(),
  heatJ: z.number(),
});

export const LOOP_STEPS = [
  'readings',
  'modelCheck',
  'refit',
  'build',
  'review',
  'issue',
  'follow',
  'report',
] as const;

/** A field's home: where the weekly loop stands. */
export const getFieldWeek = defineEndpoint({
  id: 'getFieldWeek',
  method: 'GET',
  path: '/api/fields/:fieldId',
  summary: 'This week: the state of the weekly loop',
  access: 'member',
  params: z.object({ fieldId: id }),
  reply: z.object({
    field: fieldCard,
    wells: z.array(wellSummary),
    /** Total background rate, events of M ≥ completeness per year. */
    backgroundEventsPerYear: z.number(),
    completenessMagnitude: z.number(),
    pastWeeks: z.array(pastWeek),
    /** What changed since last week, one sentence. */
    change: z.string(),
    /** The newest metered rate, to show the age of what is on the screen. */
    newestReadingAt: at.nullable(),
    newestEventAt: at.nullable(),
    steps: z.array(
      z.object({
        step: z.enum(LOOP_STEPS),
        state: z.enum(['done', 'now', 'next', 'notUsed']),
        who: z.enum(ROLES),
        sentence: z.string(),
      }),
    ),
    runningJobId: id.nullable(),
    can: z.object({ buildPlan: z.boolean() }),
  }),
});
export type FieldWeek = z.output<typeof getFieldWeek.reply>;
