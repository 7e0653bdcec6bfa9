/**
 * Pressure of wells in an infinite aquifer, to compare grids with.
 *
 *   Δp(r, t) = Q μ/(4πkh) · E1(r²/4Dt)
 *
 * Source: Theis C.V. (1935), Trans. AGU 16, 519–524. The reference reservoir of the worked values: k = 1e-13 m²,
 * h = 100 m, μ = 3e-4 Pa·s, φc_t = 1e-10 1/Pa, so D = 10/3 m²/s.
 */
import type { ReservoirSpec } from '../../models/scenario/types';

export const DAY_S = 86_400;
export const REFERENCE = {
  permeabilityM2: 1e-13,
  thicknessM: 100,
  viscosityPaS: 3e-4,
  storagePerPa: 1e-10,
} as const;
export const DIFFUSIVITY = REFERENCE.permeabilityM2 / (REFERENCE.viscosityPaS * REFERENCE.storagePerPa);
export const CONDUCTANCE = (REFERENCE.permeabilityM2 * REFERENCE.thicknessM) / REFERENCE.viscosityPaS;

/** The reference reservoir on a grid. */
export function referenceReservoir(
  size: Pick<ReservoirSpec, 'widthM' | 'heightM' | 'cellsX' | 'cellsY'>,
  changes: Partial<ReservoirSpec> = {},
): ReservoirSpec {
  return {
    ...size,
    ...REFERENCE,
    initialPressurePa: 2e7,
    densityKgPerM3: 950,
    boundary: { west: 'noFlow', east: 'noFlow', south: 'noFlow', north: 'noFlow' },
    regions: [],
    barriers: [],
    ...changes,
  };
}

/** E1(u) by its series (u ≤ 1) or continued fraction: Abramowitz & Stegun (1964), 5.1.11 and 5.1.22. */
export function exponentialIntegral(u: number): number {
  if (u > 1) {
    let fraction = 0;
    for (let n = 200; n >= 1; n--) fraction = n / (1 + n / (u + fraction));
    return Math.exp(-u) / (u + fraction);
  }
  let sum = -0.5772156649015329 - Math.log(u);
  for (let n = 1, term = 1; n < 40; n++) {
    term *= -u / n;
    sum -= term / n;
  }
  return sum;
}

export const theisPa = (rateM3PerS: number, distanceM: number, timeS: number) =>
  (rateM3PerS / (4 * Math.PI * CONDUCTANCE)) *
  exponentialIntegral(distanceM ** 2 / (4 * DIFFUSIVITY * timeS));
