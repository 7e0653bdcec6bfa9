import { describe, expect, it } from 'vitest';

import { NoPlanError, ScenarioError, StoppedError } from '../../../models/errors';
import { forecastScenario } from '../../../models/scenario/forecast-scenario';
import { planScenario } from '../../../models/scenario/plan-scenario';
import type { PlanResult, Scenario } from '../../../models/scenario/types';
import { planViolations } from '../../support/plan-violations';
import { smallScenario } from '../../support/small-scenario';

function scenarioWith(change: (scenario: Scenario) => void): Scenario {
  const scenario = smallScenario();
  change(scenario);
  return scenario;
}

/** The plan, after the checks that every plan has to pass. */
async function checkedPlan(scenario: Scenario): Promise<PlanResult> {
  const result = await planScenario(scenario);
  const violations = planViolations(scenario, result);
  for (const [kind, amount] of Object.entries(violations)) {
    const allowed =
      kind === 'balance' && scenario.plan!.setPointStepM3PerS !== null
        ? scenario.plan!.setPointStepM3PerS / 0.01
        : 0;
    expect(amount, kind).toBeLessThan(allowed + 1e-6);
  }
  expect(result.lowerBound).toBeLessThanOrEqual(result.expectedEvents);
  expect(result.gap).toBeCloseTo((result.expectedEvents - result.lowerBound!) / result.expectedEvents, 12);
  expect(result.check.relativeDifference).toBeLessThan(0.01);
  const sum = result.weeks.reduce((total, week) => total + week.expectedEvents, 0);
  expect(sum / result.expectedEvents).toBeCloseTo(1, 9);
  return result;
}

const movementOf = (scenario: Scenario, { rates }: PlanResult) =>
  rates.reduce((total, { well, weeklyM3PerS }) => {
    const last = scenario.history.find((entry) => entry.well === well)!.steps.at(-1)!.rateM3PerS;
    return (
      total +
      weeklyM3PerS.reduce(
        (sum, rate, week) => sum + Math.abs(rate - (week ? weeklyM3PerS[week - 1] : last)),
        0,
      )
    );
  }, 0);

describe('the quietest plan', () => {
  it('keeps every limit, is certified and beats what it is compared with', async () => {
    const result = await checkedPlan(smallScenario());
    expect(result.gap).toBeLessThan(6e-4);
    expect(result.expectedEvents).toBeLessThan(0.9 * result.comparison.hold.expectedEvents);
    expect(result.binding.length).toBeGreaterThan(0);
    for (const { price } of result.binding) expect(price).toBeLessThan(0);
    // Nothing that keeps the limits may lie below the bound; an even split that breaks none is such a plan.
    const split = result.comparison.evenSplit!;
    if (split.breaks.length === 0) expect(split.expectedEvents).toBeGreaterThanOrEqual(result.lowerBound!);
  });

  it('is the forecast of its own rates', async () => {
    const scenario = smallScenario();
    const result = await planScenario(scenario);
    const again = forecastScenario({ ...scenario, rates: result.rates });
    expect(again.totals.expectedEvents / result.expectedEvents).toBeCloseTo(1, 9);
  });

  it('is the same to the last bit when asked again', async () => {
    const [first, second] = [await planScenario(smallScenario()), await planScenario(smallScenario())];
    expect(second).toEqual(first);
  });

  it('keeps pressure limits that bind', async () => {
    const free = await planScenario(smallScenario());
    const limits = new Map<string, number>();
    for (const name of ['I-1', 'I-2', 'I-3']) {
      limits.set(
        name,
        Math.max(
          ...free.weeks
            .slice(0, 6)
            .map((week) => week.wells.find((entry) => entry.name === name)!.bottomHoleMaxPa),
        ),
      );
    }
    const [tight] = [...limits].sort((a, b) => b[1] - a[1]);
    const scenario = scenarioWith(({ wells }) => {
      for (const spec of wells) if (spec.name === tight[0]) spec.maxPressurePa = tight[1] - 1e5;
    });
    const result = await checkedPlan(scenario);
    expect(result.binding.some((limit) => limit.limit === 'maxPressure' && limit.well === tight[0])).toBe(
      true,
    );
    // Tightening never improves.
    expect(result.expectedEvents).toBeGreaterThanOrEqual(free.lowerBound!);
  });

  it('stops a well in its outage and steps freely in and out of it', async () => {
    const scenario = scenarioWith(({ wells }) => {
      wells[2].outages = [{ fromWeek: 3, toWeek: 4 }];
      wells[2].minRateM3PerS = 0.012;
    });
    const rates = (await checkedPlan(scenario)).rates[2].weeklyM3PerS;
    expect(rates.slice(2, 4)).toEqual([0, 0]);
    expect(rates[4]).toBeGreaterThanOrEqual(0.012);
  });

  it('does not move a fixed well', async () => {
    const scenario = scenarioWith(({ wells }) => (wells[3].control = false));
    const rates = (await checkedPlan(scenario)).rates[3].weeklyM3PerS;
    expect(new Set(rates)).toEqual(new Set([0.016]));
  });

  it('balances with a loss', async () => {
    await checkedPlan(scenarioWith(({ plan }) => (plan!.lossFraction = 0.06)));
  });

  it('polished moves less, within the tolerance', async () => {
    const best = await checkedPlan(smallScenario());
    const scenario = scenarioWith(({ plan }) => (plan!.polishTolerance = 0.005));
    const calm = await checkedPlan(scenario);
    expect(calm.expectedEvents).toBeLessThan(best.expectedEvents * 1.0052);
    expect(movementOf(scenario, calm)).toBeLessThan(movementOf(scenario, best) * 0.999);
  });

  it('rounds to whole set-points without breaking a limit', async () => {
    const step = 0.0005;
    const result = await checkedPlan(scenarioWith(({ plan }) => (plan!.setPointStepM3PerS = step)));
    for (const { weeklyM3PerS } of result.rates) {
      for (const rate of weeklyM3PerS)
        expect(Math.abs(rate / step - Math.round(rate / step))).toBeLessThan(1e-9);
    }
    expect(result.gap).toBeLessThan(0.02);
  });

  it('says so where no rounded plan keeps the limits', async () => {
    const scenario = scenarioWith(({ plan }) => {
      plan!.setPointStepM3PerS = 0.0005;
      plan!.heatCeilingJPerWeek = [1.47e13 * (1 + 1e-7)];
    });
    const result = await checkedPlan(scenario);
    expect(result.diagnostics.warnings.join()).toMatch(/not rounded/);
  });
});

describe('what does not depend on how a field is written down', () => {
  it('the order of the wells', async () => {
    const result = await planScenario(smallScenario());
    const turned = await planScenario(
      scenarioWith(({ wells, history }) => [wells.reverse(), history.reverse()]),
    );
    expect(Math.abs(turned.expectedEvents / result.expectedEvents - 1)).toBeLessThan(3e-4);
    expect(turned.lowerBound).toBeLessThanOrEqual(result.expectedEvents);
    expect(result.lowerBound).toBeLessThanOrEqual(turned.expectedEvents);
  });

  it('twice the background gives twice the events with the same rates', async () => {
    const result = await planScenario(smallScenario());
    const twice = await planScenario(
      scenarioWith(({ seismicity }) => (seismicity.backgroundEventsPerYear *= 2)),
    );
    expect(twice.expectedEvents / result.expectedEvents).toBeCloseTo(2, 6);
    expect(twice.totals.rateMultiple / result.totals.rateMultiple).toBeCloseTo(1, 6);
  });
});

describe('no plan', () => {
  const collisionOf = async (scenario: Scenario) => {
    const error = await planScenario(scenario).then(
      () => null,
      (caught: unknown) => caught,
    );
    expect(error).toBeInstanceOf(NoPlanError);
    return (error as NoPlanError).colliding;
  };

  it('names a target that the ramps cannot reach, and the shortfall', async () => {
    // Bounds, ramps and balance allow in week 1: P-1 40 l/s, P-2 30 l/s, so 70 l/s in all, and injection
    // I-1 34, I-2 24, I-3 20: 78 l/s. Most heat: (0.040·4.6e8 + 0.030·4.4e8)·604800 J.
    const most = (0.04 * 4.6e8 + 0.03 * 4.4e8) * 604_800;
    const colliding = await collisionOf(
      scenarioWith(({ plan }) => {
        plan!.heatTargetJPerWeek = [most + 1e12, ...Array<number>(5).fill(1.47e13)];
        plan!.heatCeilingJPerWeek = [];
      }),
    );
    const short = colliding.find(({ limit }) => limit === 'heatTarget')!;
    expect(short.week).toBe(1);
    expect(short.amount / 1e12).toBeCloseTo(1, 3);
    expect(short.sentence).toBe(
      'The heat target in week 1 is out of reach: it would have to be 278 MWh lower.',
    );
  });

  it('names pressure limits that leave no room', async () => {
    const colliding = await collisionOf(
      scenarioWith(({ wells }) => {
        for (const spec of wells) if (spec.kind === 'injector') spec.maxPressurePa = 2.0001e7;
      }),
    );
    expect(colliding.some(({ limit, amount }) => limit === 'maxPressure' && amount > 0)).toBe(true);
    for (const { sentence } of colliding) expect(sentence).toMatch(/week \d/);
  });

  it('needs a plan and something to move', async () => {
    await expect(planScenario(scenarioWith((scenario) => (scenario.plan = null)))).rejects.toThrow(
      ScenarioError,
    );
    await expect(
      planScenario(scenarioWith(({ wells }) => wells.forEach((spec) => (spec.control = false)))),
    ).rejects.toThrow(ScenarioError);
  });
});

describe('while it computes', () => {
  it('progress rises from 0 towards 1, in words', async () => {
    const seen: [number, string][] = [];
    await planScenario(smallScenario(), { onProgress: (fraction, step) => seen.push([fraction, step]) });
    seen.forEach(([fraction], index) => {
      expect(fraction).toBeGreaterThanOrEqual(index === 0 ? 0 : seen[index - 1][0]);
      expect(fraction).toBeLessThanOrEqual(1);
    });
    expect(seen.at(-1)![0]).toBeGreaterThan(0.95);
    expect(new Set(seen.map(([, step]) => step)).size).toBeGreaterThanOrEqual(4);
  });

  it('stops when asked to, at any time', async () => {
    let asked = 0;
    const total = await new Promise<number>((done) => {
      let count = 0;
      void planScenario(smallScenario(), { shouldStop: () => (count++, false) }).then(() => done(count));
    });
    for (const after of [0, 1, Math.floor(total / 2), total - 1]) {
      asked = 0;
      await expect(planScenario(smallScenario(), { shouldStop: () => asked++ >= after })).rejects.toThrow(
        StoppedError,
      );
    }
  });
});
