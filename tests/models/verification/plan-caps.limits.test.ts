import { describe, expect, it } from 'vitest';

import { NoPlanError } from '../../../models/errors';
import { planScenario } from '../../../models/scenario/plan-scenario';
import type { CapSpec, PlanResult, PlanSpec, Scenario, ZoneSpec } from '../../../models/scenario/types';
import { planViolations } from '../../support/plan-violations';
import { smallScenario, WEEK_S } from '../../support/small-scenario';

const PER_WEEK = (24 * 7) / 365.25;
/** The zone's share of the background: 80 of 480 cells of weight 4, the rest 0.2. */
const ZONE_CELLS = 20 * 4;
const ZONE_SHARE = (ZONE_CELLS * 4) / (ZONE_CELLS * 4 + (480 - ZONE_CELLS) * 0.2);

const cap = (scope: string, rateMultiple: number): CapSpec => ({ scope, kind: 'cumulative', rateMultiple });

function scenarioWith(change: (scenario: Scenario) => void): Scenario {
  const scenario = smallScenario();
  change(scenario);
  return scenario;
}

/** The same field at rest, with rates that may change at once: what happens is the plan's own doing. */
const fresh = (change: (scenario: Scenario) => void) =>
  scenarioWith((scenario) => {
    scenario.history = [];
    for (const spec of scenario.wells) spec.maxChangeM3PerSPerWeek = null;
    change(scenario);
  });

const NORTH_BLOCK: ZoneSpec = {
  name: 'north block',
  polygonM: [
    [2000, 3000],
    [3400, 3000],
    [3400, 3900],
    [2000, 3900],
  ],
  weight: 0.5,
};

/** The largest mean multiple of a zone from the start to the end of any week. */
function zoneUse({ weeks }: PlanResult, name: string): number {
  let sum = 0;
  const means = weeks.map(
    (week, at) => (sum += week.zones.find((zone) => zone.name === name)!.rateMultiple!) / (at + 1),
  );
  return Math.max(...means);
}

/** The largest share of a cap that is used, over all weeks; from the reported numbers alone. */
function capUse({ weeks }: PlanResult, { scope, rateMultiple }: CapSpec): number {
  let events = 0;
  return Math.max(
    ...weeks.map((week, at) => {
      const own =
        scope === 'field'
          ? week.expectedEvents
          : week.zones.find((zone) => zone.name === scope)!.expectedEvents;
      events += own;
      const background = (at + 1) * PER_WEEK * (scope === 'field' ? 1 : ZONE_SHARE);
      return events / (rateMultiple * background);
    }),
  );
}

async function checkedPlan(scenario: Scenario, withCaps = true): Promise<PlanResult> {
  const result = await planScenario(scenario);
  const step = scenario.plan!.setPointStepM3PerS;
  for (const [kind, amount] of Object.entries(planViolations(scenario, result))) {
    expect(amount, kind).toBeLessThan((kind === 'balance' && step !== null ? step / 0.01 : 0) + 1e-6);
  }
  if (withCaps)
    for (const one of scenario.plan!.caps) expect(capUse(result, one), one.scope).toBeLessThan(1 + 1e-6);
  expect(result.gap).toBeGreaterThanOrEqual(0);
  return result;
}

describe('caps on expected events', () => {
  it('a cap that is not reached changes nothing', async () => {
    const free = await planScenario(smallScenario());
    const capped = await checkedPlan(scenarioWith(({ plan }) => (plan!.caps = [cap('field', 20)])));
    expect(Math.abs(capped.expectedEvents / free.expectedEvents - 1)).toBeLessThan(4e-4);
  });

  it('a cap on a zone binds, is kept in every week, has a price and never helps', async () => {
    // The quietest plan sends water to a block where little is expected; the cap forbids a tenth of it.
    const withBlock = (change: (scenario: Scenario) => void = () => {}) =>
      fresh((scenario) => {
        scenario.seismicity.zones.push(NORTH_BLOCK);
        change(scenario);
      });
    const free = await planScenario(withBlock());
    const limit = cap('north block', 0.9 * zoneUse(free, 'north block'));
    const capped = await checkedPlan(
      withBlock(({ plan }) => (plan!.caps = [limit])),
      false,
    );
    expect(zoneUse(capped, 'north block') / limit.rateMultiple).toBeLessThan(1 + 1e-6);
    expect(zoneUse(capped, 'north block') / limit.rateMultiple).toBeGreaterThan(0.99);
    expect(capped.expectedEvents).toBeGreaterThanOrEqual(free.lowerBound!);
    expect(capped.lowerBound).toBeLessThanOrEqual(capped.expectedEvents);
    expect(capped.gap).toBeLessThan(1e-3);
    const prices = capped.binding.filter((one) => one.limit === 'cap');
    expect(prices.length).toBeGreaterThan(0);
    for (const one of prices) expect(one).toMatchObject({ scope: 'north block', unit: 'events per events' });
  });

  it('a cap that no plan keeps is named with the events that are too many', async () => {
    const error = await planScenario(scenarioWith(({ plan }) => (plan!.caps = [cap('field', 0.2)]))).catch(
      (caught: unknown) => caught,
    );
    expect(error).toBeInstanceOf(NoPlanError);
    const colliding = (error as NoPlanError).colliding.find(({ limit }) => limit === 'cap')!;
    expect(colliding).toMatchObject({ scope: 'field', unit: 'events' });
    expect(colliding.amount).toBeGreaterThan(0);
    expect(colliding.sentence).toMatch(/in the field to the end of week \d+ cannot be kept/);
  });
});

describe('most heat', () => {
  const mostHeat = (change: (scenario: Scenario) => void = () => {}) =>
    scenarioWith((scenario) => {
      Object.assign(scenario.plan!, {
        objective: 'mostHeat',
        heatTargetJPerWeek: [],
        heatCeilingJPerWeek: [],
      });
      change(scenario);
    });

  it('without caps is what bounds and ramps allow, worked by hand', async () => {
    // Producers rise by 8 l/s a week from 32 and 22 l/s to 50; injectors (34, 24, 20 … 50 l/s) can take it all.
    const result = await checkedPlan(mostHeat());
    let heatJ = 0;
    for (let week = 1; week <= 6; week++) {
      heatJ +=
        (Math.min(0.05, 0.032 + 0.008 * week) * 4.6e8 + Math.min(0.05, 0.022 + 0.008 * week) * 4.4e8) *
        WEEK_S;
    }
    expect(result.heatJ! / heatJ).toBeCloseTo(1, 6);
    expect(result.gap).toBeLessThan(1e-6);
    expect(result.lowerBound).toBeNull();
  });

  const capped = (rateMultiple: number, more: Partial<PlanSpec> = {}) =>
    fresh(({ plan }) =>
      Object.assign(
        plan!,
        { objective: 'mostHeat', heatTargetJPerWeek: [], heatCeilingJPerWeek: [] },
        { caps: rateMultiple === Infinity ? [] : [cap('field', rateMultiple)] },
        more,
      ),
    );

  it('under a cap is certified from above, keeps the cap and pays for it in heat', async () => {
    const free = await planScenario(capped(Infinity));
    const result = await checkedPlan(capped(1.3));
    expect(capUse(result, cap('field', 1.3))).toBeGreaterThan(0.999);
    expect(result.heatJ).toBeLessThan(0.99 * free.heatJ!);
    expect(result.heatUpperBoundJ).toBeGreaterThanOrEqual(result.heatJ!);
    expect(result.heatUpperBoundJ).toBeLessThanOrEqual(free.heatUpperBoundJ! * (1 + 1e-9));
    expect(result.gap).toBeLessThan(2e-3);
    const price = result.binding.find((one) => one.limit === 'cap')!;
    expect(price).toMatchObject({ scope: 'field', unit: 'J per events' });
    expect(price.price).toBeGreaterThan(0);
  });

  it('the quietest plan with nearly that heat keeps the cap as well and expects less', async () => {
    const most = await planScenario(capped(1.3));
    const quiet = await checkedPlan(
      fresh(({ plan }) => {
        plan!.caps = [cap('field', 1.3)];
        plan!.heatTargetJPerWeek = most.weeks.slice(0, 6).map((week) => week.heatJ * 0.99);
        plan!.heatCeilingJPerWeek = [];
      }),
    );
    expect(quiet.expectedEvents).toBeLessThan(most.expectedEvents);
  });

  it('polished and rounded it still keeps the cap and stays near the best', async () => {
    const result = await checkedPlan(capped(1.3, { setPointStepM3PerS: 0.0005, polishTolerance: 0.005 }));
    for (const { weeklyM3PerS } of result.rates) {
      for (const rate of weeklyM3PerS)
        expect(Math.abs(rate / 0.0005 - Math.round(rate / 0.0005))).toBeLessThan(1e-9);
    }
    expect(result.gap).toBeLessThan(0.02);
  });

  it('a wider cap never gives less', async () => {
    const heat = await Promise.all(
      [1.25, 1.3, 1.35].map(async (multiple) => (await planScenario(capped(multiple))).heatJ!),
    );
    expect(heat[1]).toBeGreaterThanOrEqual(heat[0]! * (1 - 1e-3));
    expect(heat[2]).toBeGreaterThanOrEqual(heat[1]! * (1 - 1e-3));
  });
});
