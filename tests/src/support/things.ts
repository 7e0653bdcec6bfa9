import type { FieldWeek } from '../../../src/contract/fields';
import type { Job } from '../../../src/contract/jobs';
import type { Me } from '../../../src/contract/people';
import type { PlanDetail, PlanResult } from '../../../src/contract/plans';

const WEEK_MS = 7 * 86_400_000;
/** A Monday, 00:00 in Berlin (UTC+1 in December). */
export const MONDAY = Date.UTC(2026, 11, 6, 23);
export const ZONE = 'Europe/Berlin';
const MEGAWATT_HOUR = 3.6e9;

export const me: Me = {
  id: 'person-1',
  name: 'Maren Oakhill',
  email: 'maren@example.com',
  memberships: [{ fieldId: 'field-1', fieldName: 'Harrow Fen', roles: ['fieldEngineer'] }],
};

export const field: FieldWeek['field'] = {
  id: 'field-1',
  name: 'Harrow Fen',
  place: 'Lower Wend valley',
  roles: ['fieldEngineer'],
  weekStartsAt: MONDAY - WEEK_MS,
  timeZone: ZONE,
  newestPlan: null,
  waitsForMe: 'Build the plan for the week of 7 December 2026.',
};

export const makeJob = (changes: Partial<Job> = {}): Job => ({
  id: 'job-1',
  fieldId: 'field-1',
  kind: 'plan.build',
  state: 'running',
  progress: 0.42,
  step: 'Searching for the quietest plan',
  secondsLeft: 20,
  failure: null,
  planId: 'plan-1',
  requestedBy: { id: 'person-1', name: 'Maren Oakhill' },
  attempts: 1,
  createdAt: MONDAY - 1000,
  startedAt: MONDAY - 900,
  finishedAt: null,
  can: { cancel: true },
  ...changes,
});

/** Two plan weeks and one of look-ahead for a producer, an injector and a fixed one. */
export const makeResult = (changes: Partial<PlanResult> = {}): PlanResult => {
  const well = {
    control: true,
    minRateM3PerS: 0,
    maxRateM3PerS: 0.06,
    maxChangeM3PerSPerWeek: 0.004,
    minPressurePa: null,
    maxPressurePa: null,
  };
  return {
    wells: [
      {
        ...well,
        name: 'HF-4',
        kind: 'injector',
        maxPressurePa: 2.6e7,
        lastRateM3PerS: 0.03,
        weeklyM3PerS: [0.026, 0.0225],
        weeklyState: ['atRamp', 'free'],
      },
      {
        ...well,
        name: 'HF-1',
        kind: 'producer',
        lastRateM3PerS: 0.042,
        weeklyM3PerS: [0.038, 0.0345],
        weeklyState: ['atRamp', 'atMin'],
      },
      {
        ...well,
        name: 'HF-10',
        kind: 'injector',
        control: false,
        lastRateM3PerS: 0.012,
        weeklyM3PerS: [0.012, 0.012],
        weeklyState: ['fixed', 'fixed'],
      },
    ],
    weeks: [1, 2, 3].map((week) => ({
      week,
      startsAt: MONDAY + (week - 1) * WEEK_MS,
      lookAhead: week === 3,
      expectedEvents: 0.5,
      rateMultiple: 1.1 - week * 0.01,
      zones: [{ name: 'south strand', expectedEvents: 0.3, rateMultiple: 1.3 - week * 0.05 }],
      wells: ['HF-4', 'HF-1', 'HF-10'].map((name) => ({
        name,
        bottomHoleEndPa: 2.3e7,
        bottomHoleMinPa: 2.2e7,
        bottomHoleMaxPa: 2.4e7,
      })),
      observers: [],
      heatJ: 9000 * MEGAWATT_HOUR,
      heatTargetJ: week === 3 ? null : 8900 * MEGAWATT_HOUR,
      heatCeilingJ: week === 3 ? null : 9100 * MEGAWATT_HOUR,
      chance: 0.01,
    })),
    totals: {
      expectedEvents: 1.5,
      backgroundEvents: 1.39,
      rateMultiple: 1.08,
      heatJ: 27_000 * MEGAWATT_HOUR,
    },
    planWeeks: { expectedEvents: 1, rateMultiple: 1.0714, heatJ: 18_000 * MEGAWATT_HOUR },
    lowerBound: 1.4982,
    gap: 0.001,
    binding: [
      {
        limit: 'ramp',
        well: 'HF-4',
        week: 1,
        price: -8,
        unit: 'events per m3/s',
        sentence:
          'A change of HF-4 by 1 l/s more than its weekly limit in week 1 would save 0.008 expected events.',
      },
    ],
    comparison: {
      hold: {
        expectedEvents: 2.4,
        rateMultiple: 1.73,
        meetsTargets: true,
        breaks: ['The heat passes its ceiling by up to 98.0 MWh a week in weeks 1–2.'],
        weeklyRateMultiple: [1.7, 1.72, 1.75],
        weeklyHeatJ: [9200, 9200, 9200].map((value) => value * MEGAWATT_HOUR),
      },
      evenSplit: null,
    },
    check: { expectedEvents: 1.5003, relativeDifference: 0.0002 },
    stressShadow: false,
    chanceMagnitude: 2,
    rounds: 5,
    seconds: 4.2,
    modelVersion: '1.0.0',
    inputHash: 'e3dbec3d9ac5fcef',
    ...changes,
  };
};

export const makePlan = (changes: Partial<PlanDetail> = {}): PlanDetail => ({
  plan: {
    id: 'plan-1',
    number: 3,
    name: 'Plan from 7 December 2026',
    state: 'draft',
    builtBy: { id: 'person-1', name: 'Maren Oakhill' },
    createdAt: MONDAY - 1000,
    firstWeekStartsAt: MONDAY,
    weeks: 2,
    jobId: 'job-1',
    jobState: 'done',
    outcome: null,
    notes: '',
    lookAheadWeeks: 1,
    objective: 'quietest',
  },
  timeZone: ZONE,
  request: {
    name: 'Plan from 7 December 2026',
    firstWeekStartsAt: MONDAY,
    weeks: 2,
    lookAheadWeeks: 1,
    objective: 'quietest',
    heatTargetJPerWeek: [8900 * MEGAWATT_HOUR],
    heatBand: 0.02,
    notes: '',
  },
  pastWeeks: [{ weekStartsAt: MONDAY - WEEK_MS, observedEvents: 1, rateMultiple: 1.45 }],
  backgroundEventsPerYear: 24,
  result: makeResult(),
  can: { cancel: false, buildAgain: true, withdraw: true },
  ...changes,
});
