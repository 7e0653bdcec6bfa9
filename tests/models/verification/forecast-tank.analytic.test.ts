import { describe, expect, it } from 'vitest';

import { forecastScenario } from '../../../models/scenario/forecast-scenario';
import type { Scenario } from '../../../models/scenario/types';
import { rateStateParameters } from '../../../models/seismicity/rate-state';
import { smallScenario, well, WEEK_S } from '../../support/small-scenario';

const YEAR_S = 31_557_600;

/**
 * A closed box so permeable that it is one tank: its pressure rises by q/(φ c_t h A) everywhere, so the stressing is
 * constant within a week, n = 1 + f ṗ/τ̇₀ times the background, and each week has the closed form
 *
 *   N = r₀ t_a ln(1 + (R/n)(e^{nΔt/t_a} − 1)),   R ← n/(1 + (n/R − 1) e^{−nΔt/t_a})
 *
 * Source: Dieterich (1994), JGR 99(B2), 2601–2618; Heimisson & Segall (2018), JGR Solid Earth 123, 4141–4156. Only
 * the numbers of the file go in here: what the program makes of its units and years is part of what is checked.
 */
const PAST = [0.0008, -0.0002, 0.0004];
const COMING = [0.0006, 0.0006, -0.0008, -0.0008, 0, 0.002];

function tank(): Scenario {
  const scenario = smallScenario();
  const { reservoir } = scenario;
  const weekly = (rates: number[], sign: number) => rates.map((rate) => Math.max(0, sign * rate));
  return {
    ...scenario,
    reservoir: {
      ...reservoir,
      widthM: 2000,
      heightM: 1600,
      cellsX: 10,
      cellsY: 8,
      thicknessM: 125,
      permeabilityM2: 1e-8,
      storagePerPa: 1e-10,
      boundary: { west: 'noFlow', east: 'noFlow', south: 'noFlow', north: 'noFlow' },
      barriers: [],
    },
    seismicity: {
      ...scenario.seismicity,
      friction: 0.5,
      aSigmaPa: 2e4,
      stressingRatePaPerYear: 1e4,
      backgroundEventsPerYear: 36,
      zones: [],
      elsewhereWeight: 1,
    },
    wells: [
      well({ name: 'in', kind: 'injector', xM: 500, yM: 700 }),
      well({ name: 'out', kind: 'producer', xM: 1500, yM: 900 }),
    ],
    history: [
      ['in', 1],
      ['out', -1],
    ].map(([name, sign]) => ({
      well: name as string,
      steps: weekly(PAST, sign as number).map((rateM3PerS, week) => ({
        fromS: (week - PAST.length) * WEEK_S,
        rateM3PerS,
      })),
    })),
    rates: [
      { well: 'in', weeklyM3PerS: weekly(COMING, 1) },
      { well: 'out', weeklyM3PerS: weekly(COMING, -1) },
    ],
    plan: null,
    observers: [{ name: 'far', xM: 1900, yM: 100 }],
  };
}

describe('a tank', () => {
  const storageM3PerPa = 1e-10 * 125 * 2000 * 1600;
  const { weeks, totals } = forecastScenario(tank());

  it('has the closed form’s events, week by week', () => {
    const relaxationYr = 2e4 / 1e4;
    let rate = 1;
    const events = [...PAST, ...COMING].map((q) => {
      const n = 1 + (0.5 * (q / storageM3PerPa) * YEAR_S) / 1e4;
      const exponent = (n * WEEK_S) / YEAR_S / relaxationYr;
      const count = 36 * relaxationYr * Math.log1p((rate / n) * Math.expm1(exponent));
      rate = n / (1 + (n / rate - 1) * Math.exp(-exponent));
      return count;
    });
    events.slice(PAST.length).forEach((count, week) => {
      expect(Math.abs(weeks[week].expectedEvents / count - 1), `week ${week + 1}`).toBeLessThan(2e-5);
      expect(Math.abs(weeks[week].rateMultiple / (count / (36 * (WEEK_S / YEAR_S))) - 1)).toBeLessThan(2e-5);
    });
    // The weeks differ enough for that to mean something.
    expect(Math.max(...events) / Math.min(...events)).toBeGreaterThan(1.5);
    expect(totals.backgroundEvents).toBeCloseTo((36 * COMING.length * 7) / 365.25, 9);
  });

  it('has the pressure of what went in and came out', () => {
    let volumeM3 = PAST.reduce((sum, q) => sum + q * WEEK_S, 0);
    COMING.forEach((q, week) => {
      volumeM3 += q * WEEK_S;
      const found = weeks[week].observers[0].overpressurePa;
      expect(Math.abs(found - volumeM3 / storageM3PerPa)).toBeLessThan(2e-5 * 1e4);
    });
  });
});

it('t_a = aσ/τ̇₀ in seconds, f/aσ by pascal', () => {
  const { relaxationS, stressPerPa } = rateStateParameters({
    ...smallScenario().seismicity,
    friction: 0.6,
    aSigmaPa: 1e5,
    stressingRatePaPerYear: 1e4,
  });
  expect(relaxationS).toBeCloseTo(315_576_000, 6);
  expect(stressPerPa).toBeCloseTo(6e-6, 15);
});
