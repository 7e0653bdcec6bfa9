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

/** The coming twelve weeks as the field engineer would plan them: the current week holds last week's rates. */
function scenario(): Scenario {
  const targets = demo.heatTargetJPerWeek.slice(1, 13);
  return readScenario({
    format: 'stillfield-scenario/1',
    reservoir: demo.reservoir,
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
    demo.events.forEach((event, index) => {
      expect(event.magnitude).toBeGreaterThanOrEqual(demo.seismicity.completenessMagnitude);
      expect(event.at).toBeLessThan(weekStartOf(NOW, demo.timeZone));
      if (index > 0) expect(event.at).toBeGreaterThanOrEqual(demo.events[index - 1]!.at);
      expect(event.xM).toBeGreaterThanOrEqual(0);
      expect(event.xM).toBeLessThanOrEqual(demo.reservoir.widthM);
      expect(event.yM).toBeGreaterThanOrEqual(0);
      expect(event.yM).toBeLessThanOrEqual(demo.reservoir.heightM);
    });
    expect(new Set(demo.events.map((event) => event.publicId)).size).toBe(demo.events.length);
  });

  it('has as many events as its model expects, and more of them lately', () => {
    const { weeks } = forecastScenario({
      ...scenario(),
      plan: null,
      history: [],
      rates: demo.wells.map(({ name }) => ({
        well: name,
        weeklyM3PerS: demo.weeklyRates.filter((row) => row.well === name).map((row) => row.rateM3PerS),
      })),
    });
    const expected = weeks.reduce((sum, week) => sum + week.expectedEvents, 0);
    // Three standard deviations of a Poisson count (normal approximation).
    expect(Math.abs(demo.events.length - expected)).toBeLessThan(3 * Math.sqrt(expected));
    const firstAt = Math.min(...demo.weeklyRates.map((row) => row.weekStartsAt));
    const lastAt = weekStartOf(NOW, demo.timeZone);
    const between = (from: number, to: number) =>
      demo.events.filter(({ at }) => at >= from && at < to).length / (to - from);
    const quarter = (lastAt - firstAt) / 4;
    expect(between(lastAt - quarter, lastAt)).toBeGreaterThan(1.3 * between(firstAt, lastAt - quarter));
  });

  it('has magnitudes with its own b-value, the lowest bin whole', () => {
    // Aki (1965) with half a bin taken off (Utsu 1966); its standard error is b/√N.
    const { completenessMagnitude, bValue } = demo.seismicity;
    const mean = demo.events.reduce((sum, { magnitude }) => sum + magnitude, 0) / demo.events.length;
    const found = Math.LOG10E / (mean - (completenessMagnitude - 0.05));
    expect(Math.abs(found - bValue)).toBeLessThan((2 * bValue) / Math.sqrt(demo.events.length));
    const inBin = (magnitude: number) => demo.events.filter((event) => event.magnitude === magnitude).length;
    expect(inBin(0.5)).toBeGreaterThan(inBin(0.6));
  });

  it('lies within what is usual for such fields', () => {
    // Common practice, no source.
    const { aSigmaPa, stressingRatePaPerYear } = demo.seismicity;
    const { permeabilityM2, thicknessM, viscosityPaS, storagePerPa } = demo.reservoir;
    const within = (value: number, low: number, high: number) => {
      expect(value).toBeGreaterThanOrEqual(low);
      expect(value).toBeLessThanOrEqual(high);
    };
    within(aSigmaPa, 5e3, 1e5);
    within(stressingRatePaPerYear, 1e2, 3e4);
    within(aSigmaPa / stressingRatePaPerYear, 0.5, 300);
    within((permeabilityM2 * thicknessM) / 9.869233e-13, 1, 200); // D·m
    within(permeabilityM2 / (viscosityPaS * storagePerPa), 0.01, 10); // m²/s
    for (const { rateM3PerS } of demo.weeklyRates) within(rateM3PerS, 0.025, 0.15);
  });

  describe('its story', () => {
    let result: PlanResult;
    beforeAll(async () => {
      result = await planScenario(scenario());
    }, 120_000);
    const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;

    it('with today’s rates the forecast stays well above background', () => {
      const hold = result.comparison.hold.weeklyRateMultiple.slice(0, 12);
      expect(mean(hold)).toBeGreaterThan(1.8);
      expect(mean(hold)).toBeLessThan(3);
      expect(Math.min(...hold)).toBeGreaterThan(1.8);
    });

    it('the same heat can be had near background, within every limit', () => {
      const planned = result.weeks.slice(0, 12).map((week) => week.rateMultiple);
      expect(mean(planned)).toBeLessThan(1.2);
      expect(planned.filter((multiple) => multiple < 1.35).length).toBeGreaterThanOrEqual(10);
      expect(result.gap).toBeLessThan(0.01);
      const { balance, ...others } = planViolations(scenario(), result);
      for (const [kind, amount] of Object.entries(others)) expect(amount, kind).toBeLessThan(1e-6);
      expect(balance).toBeLessThan(0.05 + 1e-6);
    });

    it('and that is no stress shadow: it settles at the background, not far below it', () => {
      for (const { rateMultiple, week } of result.weeks)
        expect(rateMultiple, `week ${week}`).toBeGreaterThan(0.9);
    });

    it('the unrest sits on the south strand', () => {
      const held = forecastScenario({ ...scenario(), rates: result.comparison.hold.rates });
      const [south, mill] = held.weeks[0]!.zones;
      expect(south!.rateMultiple!).toBeGreaterThan(2 * mill!.rateMultiple!);
    });
  });
});
