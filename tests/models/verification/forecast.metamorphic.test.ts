import { describe, expect, it } from 'vitest';

import { forecastScenario } from '../../../models/scenario/forecast-scenario';
import type { Scenario } from '../../../models/scenario/types';
import { smallScenario, WEEK_S } from '../../support/small-scenario';

const WEEKS_PER_YEAR = 365.25 / 7;

function forecast(change: (scenario: Scenario) => void = () => {}) {
  const scenario = smallScenario();
  change(scenario);
  return forecastScenario(scenario);
}

describe('a forecast', () => {
  it('without any rates is the background, in every zone and week', () => {
    const { weeks, totals } = forecast((scenario) => (scenario.history = []));
    for (const week of weeks) {
      expect(week.expectedEvents).toBeCloseTo(24 / WEEKS_PER_YEAR, 9);
      expect(week.rateMultiple).toBeCloseTo(1, 9);
      expect(week.zones[0].rateMultiple).toBeCloseTo(1, 9);
      for (const well of week.wells) expect(well.bottomHoleEndPa).toBe(2e7);
      expect(week.observers[0].overpressurePa).toBe(0);
      expect(week.heatJ).toBe(0);
    }
    expect(totals.expectedEvents).toBeCloseTo(totals.backgroundEvents, 9);
  });

  it('doubles with the background rate', () => {
    const [once, twice] = [
      forecast(),
      forecast(({ seismicity }) => (seismicity.backgroundEventsPerYear *= 2)),
    ];
    once.weeks.forEach((week, at) => {
      expect(twice.weeks[at].expectedEvents / week.expectedEvents).toBeCloseTo(2, 12);
      expect(twice.weeks[at].rateMultiple).toBeCloseTo(week.rateMultiple, 12);
    });
  });

  it('does not depend on the order of wells and lists', () => {
    const plain = forecast();
    const turned = forecast((scenario) => {
      scenario.wells.reverse();
      scenario.history.reverse();
    });
    plain.weeks.forEach((week, at) => {
      expect(turned.weeks[at].expectedEvents / week.expectedEvents).toBeCloseTo(1, 5);
      for (const { name, bottomHoleEndPa } of week.wells) {
        const other = turned.weeks[at].wells.find((well) => well.name === name)!;
        expect(Math.abs(other.bottomHoleEndPa - bottomHoleEndPa)).toBeLessThan(1);
      }
    });
  });

  it('goes on from its own history: what was planned and run is history a week later', () => {
    const rates = smallScenario().wells.map((well, j) => ({
      well: well.name,
      weeklyM3PerS: [0.02 + 0.002 * j, 0.03 - 0.002 * j],
    }));
    const ahead = forecast((scenario) => {
      scenario.plan = null;
      scenario.rates = rates;
    });
    const later = forecast((scenario) => {
      scenario.plan = null;
      for (const { steps } of scenario.history) for (const step of steps) step.fromS -= WEEK_S;
      scenario.history.forEach(({ well, steps }) =>
        steps.push({
          fromS: -WEEK_S,
          rateM3PerS: rates.find((entry) => entry.well === well)!.weeklyM3PerS[0],
        }),
      );
      scenario.rates = rates.map(({ well, weeklyM3PerS }) => ({ well, weeklyM3PerS: [weeklyM3PerS[1]] }));
    });
    expect(later.weeks[0].expectedEvents / ahead.weeks[1].expectedEvents).toBeCloseTo(1, 4);
    ahead.weeks[1].wells.forEach((well, j) => {
      expect(Math.abs(later.weeks[0].wells[j].bottomHoleEndPa - well.bottomHoleEndPa)).toBeLessThan(100);
    });
  });

  it('adds production heat by IF97 and nothing else', () => {
    const { weeks } = forecast();
    expect(weeks[0].heatJ).toBeCloseTo((0.032 * 4.6e8 + 0.022 * 4.4e8) * WEEK_S, -3);
  });

  it('rises with injection and falls with production near a zone', () => {
    const base = forecast().totals.expectedEvents;
    const more = (name: string, rate: number) =>
      forecast((scenario) => (scenario.rates = [{ well: name, weeklyM3PerS: [rate] }])).totals.expectedEvents;
    expect(more('I-1', 0.03)).toBeGreaterThan(base);
    expect(more('I-1', 0.02)).toBeLessThan(base);
    expect(more('P-1', 0.04)).toBeLessThan(base);
  });

  it('is the same to the last bit when asked again', () => {
    expect(forecast()).toEqual(forecast());
  });

  it('needs to know how many weeks', () => {
    expect(() => forecast((scenario) => (scenario.plan = null))).toThrow(/how many weeks/);
  });
});
