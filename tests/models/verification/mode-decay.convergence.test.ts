import { describe, expect, it } from 'vitest';

import { DiffusionOperator } from '../../../models/diffusion/operator';
import { stepPressure } from '../../../models/diffusion/time-stepping';
import { buildGrid, cellCentre } from '../../../models/grid/grid';
import type { BoundaryKind, ReservoirSpec } from '../../../models/scenario/types';
import { DAY_S, referenceReservoir } from '../../support/theis';

/**
 * p = cos(mπx/Lx) cos(nπy/Ly) (sin·sin with fixed pressure) decays as e^{−λt}, λ = Dπ²(m²/Lx² + n²/Ly²); on a
 * cell-centred grid its samples are exact eigenvectors with λ_h = D[4/Δx² sin²(mπΔx/2Lx) + 4/Δy² sin²(nπΔy/2Ly)].
 * Source: Carslaw & Jaeger (1959), Conduction of Heat in Solids, for the separable solutions (from memory).
 * Worked case: 4000 m × 3000 m, D = 0.5 m²/s, mode (2, 1).
 */
const WIDTH = 4000;
const HEIGHT = 3000;
const D = 0.5;
const [M, N] = [2, 1];

function box(cellsX: number, cellsY: number, kind: BoundaryKind): ReservoirSpec {
  return referenceReservoir(
    { widthM: WIDTH, heightM: HEIGHT, cellsX, cellsY },
    { storagePerPa: 1e-13 / (3e-4 * D), boundary: { west: kind, east: kind, south: kind, north: kind } },
  );
}

function modeOn(cellsX: number, cellsY: number, kind: BoundaryKind) {
  const grid = buildGrid(box(cellsX, cellsY, kind));
  const operator = new DiffusionOperator(grid);
  const shape = kind === 'noFlow' ? Math.cos : Math.sin;
  const mode = Float64Array.from({ length: operator.size }, (_, cell) => {
    const [x, y] = cellCentre(grid, cell);
    return shape((M * Math.PI * x) / WIDTH) * shape((N * Math.PI * y) / HEIGHT);
  });
  const rate = (size: number, cells: number, number: number) =>
    (4 / (size / cells) ** 2) * Math.sin((number * Math.PI) / (2 * cells)) ** 2;
  return { grid, operator, mode, lambda: D * (rate(WIDTH, cellsX, M) + rate(HEIGHT, cellsY, N)) };
}

/** How much of the mode is left, from the projection on it. */
const amplitude = (pressure: Float64Array, mode: Float64Array) => {
  const dot = (a: Float64Array, b: Float64Array) => a.reduce((sum, value, i) => sum + value * b[i], 0);
  return dot(pressure, mode) / dot(mode, mode);
};

/** Slope of log |error| between successive halvings. */
const orders = (errors: number[]) => errors.slice(1).map((error, i) => Math.log2(errors[i] / error));

describe('in space', () => {
  it.each(['noFlow', 'fixedPressure'] as const)('the operator has the mode as an eigenvector, %s', (kind) => {
    const { grid, operator, mode, lambda } = modeOn(32, 24, kind);
    const image = new Float64Array(operator.size);
    operator.apply(mode, image);
    mode.forEach((value, cell) => {
      expect(Math.abs(image[cell] / grid.storageM3PerPa[cell] - lambda * value)).toBeLessThan(
        1e-12 * lambda * 1e3,
      );
    });
  });

  it('order 2: amplitudes after 30 days', () => {
    const exact = Math.exp(-1.782011906e-6 * 30 * DAY_S);
    expect(exact).toBeCloseTo(0.009862901738, 9);
    const found = [16, 32, 64, 128].map((cells) => {
      const { operator, mode, grid } = modeOn(cells, (cells * 3) / 4, 'noFlow');
      const image = new Float64Array(operator.size);
      operator.apply(mode, image);
      const lambda = amplitude(image, mode) / grid.storageM3PerPa[0];
      return Math.exp(-lambda * 30 * DAY_S);
    });
    // Worked values for these four grids.
    [0.01035804093, 0.009984850937, 0.009893275309, 0.009870488038].forEach((value, at) =>
      expect(Math.abs(found[at] / value - 1)).toBeLessThan(1e-9),
    );
    const errors = found.map((value) => Math.abs(value - exact));
    for (const order of orders(errors)) expect(Math.abs(order - 2)).toBeLessThan(0.1);
    expect(errors[3] / exact).toBeLessThan(1e-3);
  });
});

describe('in time (TR-BDF2)', () => {
  const stepped = (steps: number) => {
    const { operator, mode } = modeOn(32, 24, 'noFlow');
    const pressure = mode.slice();
    const lengthS = (30 * DAY_S) / steps;
    const result = stepPressure(
      operator,
      pressure,
      [0, 30 * DAY_S],
      () => {},
      { tolerancePa: Infinity, firstStepS: lengthS, shareSinceChange: 1, longestStepS: lengthS },
      () => {},
    );
    expect(result.steps).toBe(steps);
    return amplitude(pressure, mode);
  };
  const { lambda } = modeOn(32, 24, 'noFlow');

  it.each([15, 30, 60])('%i steps multiply the mode by the stability function to round-off', (steps) => {
    // Bank et al. (1985), IEEE Trans. CAD 4(4), 436–451: trapezium to γΔt, then BDF2, γ = 2 − √2.
    const gamma = 2 - Math.SQRT2;
    const z = (-lambda * 30 * DAY_S) / steps;
    const middle = (1 + (gamma * z) / 2) / (1 - (gamma * z) / 2);
    const share = 1 / (gamma * (2 - gamma));
    const factor = (share * middle - (1 - gamma) ** 2 * share) / (1 - ((1 - gamma) / (2 - gamma)) * z);
    expect(Math.abs(stepped(steps) / factor ** steps - 1)).toBeLessThan(1e-9);
  });

  it('order 2', () => {
    const exact = Math.exp(-lambda * 30 * DAY_S);
    const errors = [15, 30, 60, 120].map((steps) => Math.abs(stepped(steps) - exact));
    for (const order of orders(errors)) expect(Math.abs(order - 2)).toBeLessThan(0.1);
    expect(errors[3] / exact).toBeLessThan(1e-3);
  });
});
