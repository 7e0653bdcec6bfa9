import { describe, expect, test } from 'vitest';

import { bindingSentence } from '../../server/features/plans/binding-sentence';
import { changeSentence } from '../../server/features/fields/change';
import { weeklyStates } from '../../server/features/plans/weekly-state';
import { planWeekTotals } from '../../server/jobs/plan-week-totals';
import type { PlanResult, PlanSpec, WellSpec } from '../../models/scenario/types';

describe('what a binding limit costs', () => {
  test.each([
    // price per J × 3.6e11 J (100 MWh), per m³/s × 1e-3 (1 l/s), per Pa × 1e5 (1 bar); by hand
    [
      { limit: 'heatTarget', week: 2, price: -1.8e-12, unit: 'events per J' },
      '100 MWh less heat in week 2 would save 0.65 expected events.',
    ],
    [
      { limit: 'ramp', well: 'I-1', week: 3, price: -224, unit: 'events per m3/s' },
      'A change of I-1 by 1 l/s more than its weekly limit in week 3 would save 0.22 expected events.',
    ],
    [
      { limit: 'maxPressure', well: 'I-1', week: 1, price: -3e-8, unit: 'events per Pa' },
      'A pressure limit of I-1 that is 1 bar higher in week 1 would save 0.0030 expected events.',
    ],
    [
      { limit: 'massBalance', price: -20_000, unit: 'events per m3/s' },
      '1 l/s of difference between production and injection would save 20 expected events.',
    ],
  ])('%j', (limit, sentence) => {
    expect(bindingSentence(limit)).toBe(sentence);
  });
});

describe('what holds a rate where it is', () => {
  const well: WellSpec = {
    name: 'I-1',
    kind: 'injector',
    xM: 0,
    yM: 0,
    radiusM: 0.1,
    skin: 0,
    control: true,
    minRateM3PerS: 0.01,
    maxRateM3PerS: 0.05,
    maxChangeM3PerSPerWeek: 0.01,
    minPressurePa: null,
    maxPressurePa: null,
    heatJPerM3: 0,
    outages: [],
  };
  const plan = { setPointStepM3PerS: 0.0005 } as PlanSpec;

  test.each([
    ['between its limits', well, 0.03, [0.031, 0.029], ['free', 'free']],
    [
      'at its least and most',
      well,
      0.02,
      [0.01, 0.02, 0.03, 0.04, 0.05],
      ['atMin', 'atRamp', 'atRamp', 'atRamp', 'atMax'],
    ],
    ['a fixed well', { ...well, control: false }, 0.03, [0.03], ['fixed']],
    [
      'out, and free to come back at any rate',
      { ...well, outages: [{ fromWeek: 2, toWeek: 2 }] },
      0.03,
      [0.03, 0, 0.045],
      ['free', 'outage', 'free'],
    ],
    ['a limit between two set-points', { ...well, maxRateM3PerS: 0.0402 }, 0.04, [0.04], ['atMax']],
    ['no limit on changes', { ...well, maxChangeM3PerSPerWeek: null }, 0.02, [0.045], ['free']],
  ])('%s', (_case, spec, last, weekly, states) => {
    expect(weeklyStates(spec as WellSpec, plan, last, weekly)).toEqual(states);
  });
});

describe('what changed since last week', () => {
  const week = (observedEvents: number, heatJ: number) => ({
    weekStartsAt: 0,
    rateMultiple: 0,
    observedEvents,
    heatJ,
  });
  test.each([
    [[], 'Nothing has been measured yet.'],
    [[week(0, 1)], 'In the first measured week no earthquakes were located.'],
    [
      [week(3, 100), week(1, 102)],
      'Last week one earthquake was located (3 the week before), and the heat delivered rose by 2.0 %.',
    ],
    [
      [week(1, 100), week(4, 100)],
      'Last week 4 earthquakes were located (1 the week before), and the heat delivered stayed the same.',
    ],
    [
      [week(0, 100), week(0, 0)],
      'Last week no earthquakes were located (0 the week before), and the heat delivered fell by 100.0 %.',
    ],
  ])('%#', (weeks, sentence) => {
    expect(changeSentence(weeks)).toBe(sentence);
  });
});

test("a plan's own weeks are summed without the look-ahead", () => {
  const weeks = [1, 2, 4].map((expectedEvents) => ({ expectedEvents, heatJ: 10 }));
  const result = { weeks, totals: { backgroundEvents: 6 } } as unknown as PlanResult;
  // Two of three weeks: 3 events against a background of 4.
  expect(planWeekTotals(result, 2)).toEqual({ expectedEvents: 3, heatJ: 20, rateMultiple: 0.75 });
});
