import { describe, expect, it } from 'vitest';

import { logPanelIntegral, panelScratch, softplus } from '../../../models/seismicity/exponential-integral';
import { logFOverLinearStep } from '../../../models/seismicity/rate-state';
import { panelShape } from '../../../models/seismicity/time-panels';

/**
 * Worked values (25 digits, some re-obtained by direct integration of the equation) of Dieterich's (1994) law in the
 * form of Segall & Lu (2015), closed by Heimisson & Segall (2018): aσ = 0.1 MPa, τ̇₀ = 0.01 MPa/yr, so t_a = 10 yr.
 * R is relative to the background, N/r₀ in years.
 */
const RELAXATION_YR = 10;
const ASIGMA_MPA = 0.1;
const WEEK_YR = 7 / 365.25;
const WITHIN = 1e-8;

interface Stretch {
  lengthYr: number;
  /** Rise of the Coulomb stress over it, background included, MPa. */
  stressMPa: number;
}

/** One row after another of linear stress, from a rate and after a sudden step of stress. */
function run(stretches: Stretch[], rate = 1, stepMPa = 0): { rate: number; count: number } {
  let logRate = Math.log(rate) + stepMPa / ASIGMA_MPA;
  let count = 0;
  for (const { lengthYr, stressMPa } of stretches) {
    const rise = stressMPa / ASIGMA_MPA;
    const logF = logFOverLinearStep(logRate, rise, lengthYr, RELAXATION_YR);
    count += RELAXATION_YR * logF;
    logRate += rise - logF;
  }
  return { rate: Math.exp(logRate), count };
}

const constant = (lengthYr: number, n = 1): Stretch => ({ lengthYr, stressMPa: 0.01 * n * lengthYr });
const relative = (value: number, expected: number) =>
  expected === 0 ? Math.abs(value) : Math.abs(value / expected - 1);

describe('rate and count', () => {
  it.each([
    ['ten times the stressing, 1 week', run([constant(WEEK_YR, 10)]), 1.017381172, 0.01933108552],
    ['ten times the stressing, 0.1 yr', run([constant(0.1, 10)]), 1.093668704, 0.1046217193],
    ['ten times the stressing, 1 yr', run([constant(1, 10)]), 2.319693167, 1.585650787],
    ['ten times the stressing, 3 yr', run([constant(3, 10)]), 6.905678577, 10.67655945],
    ['step +0.3 MPa, at once', run([], 1, 0.3), 20.08553692, 0],
    ['step +0.3 MPa, 1 day', run([constant(1 / 365.25)], 1, 0.3), 19.98114304, 0.05484804089],
    ['step +0.3 MPa, 1 week', run([constant(WEEK_YR)], 1, 0.3), 19.37744032, 0.3780697619],
    ['step +0.3 MPa, 1 yr', run([constant(1)], 1, 0.3), 7.13206814, 11.35398746],
    ['step +0.3 MPa, 10 yr', run([constant(10)], 1, 0.3), 1.53742981, 35.69887932],
    ['step +0.3 MPa, 30 yr', run([constant(30)], 1, 0.3), 1.04965753, 59.51536051],
    ['step −0.3 MPa, at once', run([], 1, -0.3), 0.04978706837, 0],
    ['step −0.3 MPa, 1 week', run([constant(WEEK_YR)], 1, -0.3), 0.04987781281, 0.0009550362568],
    ['step −0.3 MPa, 10 yr', run([constant(10)], 1, -0.3), 0.1246699883, 0.8208512655],
    ['step −0.3 MPa, 30 yr', run([constant(30)], 1, -0.3), 0.5127645211, 6.679385623],
    [
      'R₀ = 3, +0.02 MPa in a week',
      run([{ lengthYr: WEEK_YR, stressMPa: 0.02 + 0.01 * WEEK_YR }], 3),
      3.64799582,
      0.06350857835,
    ],
    [
      'R₀ = 3, −0.02 MPa in a week',
      run([{ lengthYr: WEEK_YR, stressMPa: -0.02 + 0.01 * WEEK_YR }], 3),
      2.448134936,
      0.05202300268,
    ],
    ['R₀ = 3, nothing', run([constant(WEEK_YR)], 3), null, 0.05738502859],
  ] as const)('%s', (_name, found, rate, count) => {
    if (rate !== null) expect(relative(found.rate, rate)).toBeLessThan(WITHIN);
    expect(relative(found.count, count)).toBeLessThan(WITHIN);
  });

  // 0.3 MPa on top of the background over a year, then background alone.
  const ramp = (yr: number): Stretch => ({ lengthYr: yr, stressMPa: 0.31 * yr });
  it.each([
    ['0.25 yr', [ramp(0.25)], 2.091610738, 0.3706554279],
    ['1 yr', [ramp(1)], 13.18320878, 5.210560422],
    ['2 yr', [ramp(1), constant(1)], 6.105073941, 13.90879781],
    ['10 yr', [ramp(1), constant(9)], 1.601870209, 35.28828173],
  ] as const)('a ramp of 0.3 MPa in a year and a hold, after %s', (_name, stretches, rate, count) => {
    const found = run([...stretches]);
    expect(relative(found.rate, rate)).toBeLessThan(WITHIN);
    expect(relative(found.count, count)).toBeLessThan(WITHIN);
  });

  it('no stressing at all after that ramp: decay without a floor', () => {
    const still = (lengthYr: number): Stretch => ({ lengthYr, stressMPa: 0 });
    expect(relative(run([ramp(1), still(WEEK_YR)]).rate, 12.85833572)).toBeLessThan(WITHIN);
    expect(relative(run([ramp(1), still(1)]).rate, 5.68653326)).toBeLessThan(WITHIN);
  });

  it('five weeks of changing stressing', () => {
    const weeks = [1, 20, 5, -10, 0].map((n) => constant(WEEK_YR, n));
    const rates = [1, 1.0370479, 1.04494634, 1.02308132, 1.02107926];
    const counts = [0.0191649555, 0.0195179293, 0.019950593, 0.0198160215, 0.0195881108];
    weeks.forEach((_, index) => {
      const now = run(weeks.slice(0, index + 1));
      expect(relative(now.rate, rates[index])).toBeLessThan(WITHIN);
      expect(relative(now.count - run(weeks.slice(0, index)).count, counts[index])).toBeLessThan(WITHIN);
    });
    expect(relative(run(weeks).count, 0.09803761)).toBeLessThan(WITHIN);
  });

  it.each([
    [5, 1.9617],
    [10, 0.8109],
    [50, 0.1428],
  ])('%f times the stressing doubles the rate after %f yr', (n, yr) => {
    expect(Math.abs(run([constant(yr, n)]).rate - 2)).toBeLessThan(1e-3);
  });

  it('a shadow of 0.3 MPa is half over after 29.48930819 yr', () => {
    expect(relative(run([constant(29.48930819)], 1, -0.3).rate, 0.5)).toBeLessThan(WITHIN);
  });

  it('a step brings r₀Δτ/τ̇₀ events in the end: 29.515 of 30 years’ worth after 30 years', () => {
    const excess = (yr: number) => run([constant(yr)], 1, 0.3).count - yr;
    expect(Math.abs(excess(30) - 29.51536051)).toBeLessThan(1e-7);
    expect(excess(200)).toBeCloseTo(30, 6);
    expect(run([constant(300)], 1, -0.3).count - 300).toBeCloseTo(-30, 6);
  });

  it('early after a step: Omori’s law, 1/(t/t_a + e^(−Δτ/aσ))', () => {
    for (const [days, rate] of [
      [1, 19.97568821],
      [7, 19.3410265],
    ]) {
      const yr = days / 365.25;
      expect(relative(1 / (yr / RELAXATION_YR + Math.exp(-3)), rate)).toBeLessThan(WITHIN);
      expect(relative(run([constant(yr)], 1, 0.3).rate, rate)).toBeLessThan(2 * (yr / RELAXATION_YR) * 1.05);
    }
  });

  it('nothing induced, nothing added: N = r₀ t', () => {
    for (const yr of [1e-6, 0.02, 1, 10, 100])
      expect(relative(run([constant(yr)]).count, yr)).toBeLessThan(1e-12);
  });

  it('a stretch may be cut anywhere', () => {
    const whole = run([constant(3, 10)], 2);
    const cut = run(
      Array.from({ length: 300 }, () => constant(0.01, 10)),
      2,
    );
    expect(relative(cut.rate, whole.rate)).toBeLessThan(1e-11);
    expect(relative(cut.count, whole.count)).toBeLessThan(1e-11);
  });
});

describe('against the differential equation itself', () => {
  /** dR/dt = (R/t_a)(τ̇/τ̇₀ − R) and dN/dt = R by the classical Runge–Kutta method. */
  function integrate(stretches: Stretch[], rate: number, stepsEach = 4000): { rate: number; count: number } {
    let count = 0;
    for (const { lengthYr, stressMPa } of stretches) {
      const n = stressMPa / lengthYr / 0.01;
      const slope = (r: number) => (r / RELAXATION_YR) * (n - r);
      const h = lengthYr / stepsEach;
      for (let step = 0; step < stepsEach; step++) {
        const k1 = slope(rate);
        const k2 = slope(rate + (h / 2) * k1);
        const k3 = slope(rate + (h / 2) * k2);
        const k4 = slope(rate + h * k3);
        count += h * rate + ((h * h) / 6) * (k1 + k2 + k3);
        rate += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
      }
    }
    return { rate, count };
  }

  it.each([
    ['a ramp and a hold', [{ lengthYr: 1, stressMPa: 0.31 }, constant(9)], 1],
    [
      'unloading from a high rate',
      [{ lengthYr: WEEK_YR, stressMPa: -0.02 + 0.01 * WEEK_YR }, constant(1)],
      3,
    ],
    ['up, down and up', [constant(0.5, 20), constant(0.5, -15), constant(0.5, 8)], 0.4],
  ] as const)('%s', (_name, stretches, start) => {
    const [closed, stepped] = [run([...stretches], start), integrate([...stretches], start)];
    expect(relative(closed.rate, stepped.rate)).toBeLessThan(1e-10);
    expect(relative(closed.count, stepped.count)).toBeLessThan(1e-10);
  });
});

describe('far outside what a plain formula survives', () => {
  it.each([700, 2000, -700, -2000, 0, 1e-9, -1e-9])('a rise of %f', (rise) => {
    const logF = logFOverLinearStep(0, rise, 1, 10);
    // For a large rise ln F → rise − ln(rise) − ln 10 (with e^rise/rise ≫ 1), for a large fall F − 1 → 1/(10·|rise|).
    if (rise > 100) expect(relative(logF, rise - Math.log(rise) - Math.log(10))).toBeLessThan(1e-12);
    else if (rise < -100) expect(relative(logF, Math.log1p(0.1 / -rise))).toBeLessThan(1e-12);
    else expect(relative(logF, Math.log1p(0.1 * (1 + rise / 2)))).toBeLessThan(1e-12);
  });

  it('panels agree with the exact step where g is linear, at any height', () => {
    const shape = panelShape(6, 10, true);
    for (const start of [-800, -3, 0, 5, 800]) {
      for (const rise of [-300, -1, 1e-3, 2, 300]) {
        const g = Float64Array.from(shape.nodeAt, (at) => start + rise * at);
        const found = logPanelIntegral(shape, 2, g, 0, panelScratch(shape.pieces), null);
        const exact =
          start +
          Math.log(2) +
          (rise === 0 ? 0 : Math.log(Math.abs(Math.expm1(-Math.abs(rise)) / rise)) + Math.max(rise, 0));
        expect(Math.abs(found - exact)).toBeLessThan(1e-9);
      }
    }
  });

  it('softplus neither overflows nor loses small values', () => {
    expect(softplus(1000)).toBe(1000);
    expect(softplus(-50)).toBeCloseTo(Math.exp(-50), 30);
    expect(softplus(0)).toBeCloseTo(Math.LN2, 15);
  });
});

describe('what is convex and what is not', () => {
  const afterStep = (x: number, yr: number) => run([constant(yr)], 1, x * ASIGMA_MPA);

  it('the count from the start is, in a step of stress', () => {
    for (let x = -6; x <= 6; x += 0.5) {
      const middle = afterStep(x, 1).count;
      expect((afterStep(x - 1, 1).count + afterStep(x + 1, 1).count) / 2).toBeGreaterThanOrEqual(middle);
    }
  });

  it('and in a year’s stressing rate: worked values', () => {
    const counts = [-0.3, -0.15, 0, 0.15, 0.3].map((q) => run([{ lengthYr: 1, stressMPa: 0.01 + q }]).count);
    [0.3206576031, 0.5241644087, 1, 2.207924108, 5.210560422].forEach((count, at) =>
      expect(relative(counts[at], count)).toBeLessThan(WITHIN),
    );
    for (let at = 1; at < 4; at++) expect((counts[at - 1] + counts[at + 1]) / 2).toBeGreaterThan(counts[at]);
  });

  it('the rate at the end is not: worked values', () => {
    [1, 2.336264832, 4.595186785, 7.13206814, 8.949726555].forEach((rate, x) =>
      expect(relative(afterStep(x, 1).rate, rate)).toBeLessThan(WITHIN),
    );
    expect(relative(afterStep(6, 1).rate, 10.26636603)).toBeLessThan(WITHIN);
    const midpoint = (afterStep(2, 1).rate + afterStep(4, 1).rate) / 2;
    expect(midpoint).toBeCloseTo(6.772, 3);
    expect(midpoint).toBeLessThan(afterStep(3, 1).rate);
  });

  it('the count of a later window is not: worked values', () => {
    const later = (x: number) => afterStep(x, 2).count - afterStep(x, 1).count;
    [1, 2.19703334, 3.94255861, 5.59665018, 6.63332589].forEach((count, x) =>
      expect(relative(later(x), count)).toBeLessThan(WITHIN),
    );
    expect(relative(later(6), 7.3223478)).toBeLessThan(WITHIN);
    expect((later(2) + later(4)) / 2).toBeCloseTo(5.288, 3);
    expect((later(2) + later(4)) / 2).toBeLessThan(later(3));
  });

  it('its slope by the stressing rate: 9.090909091 yr a MPa/yr at eleven times the background in a year', () => {
    const countAt = (q: number) => run([{ lengthYr: 1, stressMPa: 0.01 + q }]).count;
    const h = 1e-4;
    const slope = (countAt(0.1 + h) - countAt(0.1 - h)) / (2 * h);
    expect(relative(slope, 9.090909091)).toBeLessThan(1e-6);
  });
});
