import { describe, expect, it } from 'vitest';

import { equivalentRadiusM, wellDrawdownPaPerM3PerS } from '../../../models/wells/peaceman';
import { superposedPressure } from '../../support/superposed-pressure';
import { CONDUCTANCE, DAY_S, referenceReservoir, theisPa } from '../../support/theis';

const relative = (value: number, expected: number) => Math.abs(value / expected - 1);
const drop = (dxM: number, skin: number, dyM = dxM) =>
  0.05 * wellDrawdownPaPerM3PerS({ dxM, dyM, radiusM: 0.1, skin, transmissivity: CONDUCTANCE });

describe('Peaceman’s well', () => {
  // Peaceman D.W. (1978), SPE J. 18(3), 183–194; (1983), SPE J. 23(3), 531–543: isotropic, so 0.14 √(Δx² + Δy²).
  it.each([
    [50, 50, 9.899494937],
    [50, 100, 15.65247584],
  ])('equivalent radius on %f × %f m', (dxM, dyM, radius) => {
    expect(relative(equivalentRadiusM(dxM, dyM), radius)).toBeLessThan(1e-9);
  });

  // Reference reservoir, r_w = 0.1 m, 50 l/s: pressure between well and cell, kPa.
  it.each([
    [50, 0, 1096.9919],
    [50, 5, 2290.654],
    [50, -2, 619.527],
    [25, 0, 931.5152],
  ])('Δx = %f m, skin %f', (dxM, skin, kilopascal) => {
    expect(relative(drop(dxM, skin), kilopascal * 1e3)).toBeLessThan(1e-7);
  });

  it('delivers 4.5579 l/s a bar on cells of 50 m', () => {
    expect(relative(0.05 / drop(50, 0), 4.557918888e-8)).toBeLessThan(1e-9);
  });

  it.each([25, 50, 100])(
    'on %f m: Theis at the equivalent radius and the drop to the well are Theis there',
    (sizeM) => {
      // 2379.0729 kPa: worked value for r_w = 0.1 m after 7 days. The rounded 0.14 leaves 0.05 %.
      const total = theisPa(0.05, equivalentRadiusM(sizeM, sizeM), 7 * DAY_S) + drop(sizeM, 0);
      expect(relative(theisPa(0.05, 0.1, 7 * DAY_S), 2379.0729e3)).toBeLessThan(1e-7);
      expect(relative(total, 2379.0729e3)).toBeLessThan(5e-4);
    },
  );

  it('gives the same bottom-hole pressure on 25, 50 and 100 m: Theis at the well’s radius, within 0.5 %', () => {
    const exact = theisPa(0.05, 0.1, DAY_S);
    for (const [sizeM, cells] of [
      [25, 161],
      [50, 81],
      [100, 41],
    ] as const) {
      const side = sizeM * cells;
      const reservoir = referenceReservoir({ widthM: side, heightM: side, cellsX: cells, cellsY: cells });
      const middle: [number, number] = [side / 2, side / 2];
      const [[cellPressure]] = superposedPressure(
        reservoir,
        [{ at: middle, steps: [[0, 0.05]] }],
        [middle],
        [DAY_S],
      );
      expect(relative(cellPressure + drop(sizeM, 0), exact), `${sizeM} m`).toBeLessThan(0.005);
    }
  });
});
