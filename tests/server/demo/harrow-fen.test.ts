import { beforeAll, describe, expect, it } from 'vitest';

import { forecastScenario } from '../../../models/scenario/forecast-scenario';
import { planScenario } from '../../../models/scenario/plan-scenario';
import { readScenario } from '../../../models/scenario/read-scenario';
import type { PlanResult, Scenario } from '../../../models/scenario/types';
import { buildHarrowFen } from '../../../server/demo/harrow-fen';
import { weekStartOf } from '../../../server/time/local-week';
import { planViolations } from '../../support/plan-violations';
import { WEEK_S } from '../../support/small-scenario';

const NOW = Date.UTC(2026, 10, 25, 9);
const demo = buildHarrowFen(NOW);

/** The coming twelve weeks on a coarser grid than the field's own, to be quick. */
function scenario(): Scenario {
  const targets = demo.heatTargetJPerWeek.slice(1, 13);
  return readScenario({
    format: 'stillfield-scenario/1',
    reservoir: { ...demo.reservoir, cellsX: 40, cellsY: 40 },
    seismicity: demo.seismicity,
    wells: demo.wells,
    history: demo.wells.map(({ name }) => {
      const weekly = demo.weeklyRates.filter((row) => row.well === name);
      const steps = weekly.map(({ rateM3PerS }, index) => ({
        fromS: (index - weekly.length - 1) * WEEK_S,
        rateM3PerS,
      }));
      return { well: name, steps };
    }),
    rates: [],
    plan: {
      weeks: 12,
      lookAheadWeeks: 26,
      objective: 'quietest',
      heatTargetJPerWeek: targets,
      heatCeilingJPerWeek: targets.map((target) => 1.02 * target),
      lossFraction: 0,
      caps: [],
      setPointStepM3PerS: 0.0005,
      polishTolerance: 0.005,
    },
    observers: demo.monitors,
  });
}

describe('Harrow Fen', () => {
  it('is the same every time it is asked for', () => {
    expect(buildHarrowFen(NOW)).toEqual(demo);
  });

  it('has been measured up to the last complete week, in balance', () => {
    const lastWeekAt = Math.max(...demo.weeklyRates.map((row) => row.weekStartsAt));
    const last = demo.weeklyRates.filter((row) => row.weekStartsAt === lastWeekAt);
    expect(lastWeekAt).toBeLessThan(weekStartOf(NOW, demo.timeZone));
    expect(last).toHaveLength(10);
    const net = last.reduce(
      (sum, { well, rateM3PerS }) => sum + (/^HF-[123]$/.test(well) ? -1 : 1) * rateM3PerS,
      0,
    );
    expect(Math.abs(net)).toBeLessThan(1e-9);
    for (const { well, rateM3PerS } of last) {
      const spec = demo.wells.find((entry) => entry.name === well)!;
      expect(rateM3PerS).toBeGreaterThanOrEqual(spec.minRateM3PerS);
      expect(rateM3PerS).toBeLessThanOrEqual(spec.maxRateM3PerS!);
    }
  });

  it('delivers 60 to 70 MW of heat', () => {
    for (const heatJ of demo.heatTargetJPerWeek) {
      expect(heatJ / WEEK_S / 1e6).toBeGreaterThan(60);
      expect(heatJ / WEEK_S / 1e6).toBeLessThan(70);
    }
  });

  it('has a catalogue inside the field, in order, of magnitudes at or above completeness', () => {
    expect(demo.events.length).toBeGreaterThan(78);
    demo.events.forEach((event, index) => {
      expect(event.magnitude).toBeGreaterThanOrEqual(demo.seismicity.completenessMagnitude);
      expect(event.at).toBeLessThan(weekStartOf(NOW, demo.timeZone));
      if (index > 0) expect(event.at).toBeGreaterThanOrEqual(demo.events[index - 1]!.at);
    });
    expect(new Set(demo.events.map((event) => event.publicId)).size).toBe(demo.events.length);
  });

  describe('its story', () => {
    let result: PlanResult;
    beforeAll(async () => {
      result = await planScenario(scenario());
    });
    const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;

    it('with today’s rates the forecast stays about twice background', () => {
      const hold = mean(result.comparison.hold.weeklyRateMultiple.slice(0, 12));
      expect(hold).toBeGreaterThan(1.7);
      expect(hold).toBeLessThan(2.6);
    });

    it('the same heat can be had near background, within every limit', () => {
      const planned = mean(result.weeks.slice(0, 12).map((week) => week.rateMultiple));
      expect(planned).toBeLessThan(1.35);
      expect(result.weeks[11]!.rateMultiple).toBeLessThan(1.1);
      const { balance, ...others } = planViolations(scenario(), result);
      for (const [kind, amount] of Object.entries(others)) expect(amount, kind).toBeLessThan(1e-6);
      expect(balance).toBeLessThan(0.05 + 1e-6);
    });

    it('the unrest sits on the south strand', () => {
      const held = forecastScenario({ ...scenario(), rates: result.comparison.hold.rates });
      const [south, mill] = held.weeks[0]!.zones;
      expect(south!.rateMultiple!).toBeGreaterThan(2 * mill!.rateMultiple!);
    });
  });
});
