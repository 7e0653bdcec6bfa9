import { describe, expect, it } from 'vitest';

import { amplitudesAt } from '../../../models/diffusion/amplitudes';
import { DiffusionOperator } from '../../../models/diffusion/operator';
import { buildResponseLibrary } from '../../../models/diffusion/response-library';
import { stepPressure } from '../../../models/diffusion/time-stepping';
import { buildGrid, cellAt, type Grid } from '../../../models/grid/grid';
import type { ReservoirSpec } from '../../../models/scenario/types';
import { smallScenario } from '../../support/small-scenario';
import { DAY_S } from '../../support/theis';

/** Rough ground: a fifty-fold contrast, a leaky and a sealed fault, cells that are not square. */
function rough(kind: 'noFlow' | 'fixedPressure'): ReservoirSpec {
  return {
    ...smallScenario().reservoir,
    cellsX: 40,
    cellsY: 25,
    boundary: { west: kind, east: 'noFlow', south: 'noFlow', north: kind },
    regions: [
      {
        name: 'tight',
        polygonM: [
          [0, 0],
          [2600, 0],
          [2600, 1700],
          [0, 1700],
        ],
        permeabilityFactor: 0.02,
        storageFactor: 0.7,
      },
    ],
    barriers: [
      {
        name: 'leaky',
        lineM: [
          [3000, 0],
          [3000, 3000],
        ],
        transmissibilityFactor: 0.02,
      },
      {
        name: 'sealed',
        lineM: [
          [500, 2500],
          [2500, 3300],
        ],
        transmissibilityFactor: 0,
      },
    ],
  };
}

const ADAPTIVE = { tolerancePa: 1, firstStepS: 900, shareSinceChange: 0.1, longestStepS: Infinity };

function stepped(grid: Grid, cell: number, rate: number, untilS: number, options = ADAPTIVE): Float64Array {
  const operator = new DiffusionOperator(grid);
  const pressure = new Float64Array(operator.size);
  stepPressure(
    operator,
    pressure,
    [0, untilS],
    (_, source) => (source[cell] += rate),
    options,
    () => {},
  );
  return pressure;
}

function byLibrary(grid: Grid, cell: number, steps: [number, number][], timeS: number): Float64Array {
  const { wells } = buildResponseLibrary(new DiffusionOperator(grid), [cell], { longestS: 200 * DAY_S });
  const [response] = wells;
  const row = amplitudesAt(
    response,
    steps.map(([fromS, rateM3PerS]) => ({ fromS, rateM3PerS })),
    [timeS],
  );
  return Float64Array.from({ length: grid.nx * grid.ny }, (_, at) =>
    row.reduce((sum, value, k) => sum + value * response.modes[at * response.count + k], 0),
  );
}

const storedM3 = (grid: Grid, pressure: Float64Array) =>
  pressure.reduce((sum, value, cell) => sum + value * grid.storageM3PerPa[cell], 0);

describe('a closed reservoir keeps every litre', () => {
  const grid = buildGrid(rough('noFlow'));
  const cell = cellAt(grid, 3600, 900);

  it('in the response library, to round-off', () => {
    const steps: [number, number][] = [
      [0, 0.03],
      [10 * DAY_S, -0.02],
      [40 * DAY_S, 0.01],
    ];
    const volume = (10 * 0.03 - 30 * 0.02 + 50 * 0.01) * DAY_S;
    expect(storedM3(grid, byLibrary(grid, cell, steps, 90 * DAY_S)) / volume).toBeCloseTo(1, 9);
  });

  it('in time-stepping, to round-off', () => {
    expect(storedM3(grid, stepped(grid, cell, 0.03, 30 * DAY_S)) / (0.03 * 30 * DAY_S)).toBeCloseTo(1, 9);
  });
});

describe('reciprocity: what A does at B, B does at A', () => {
  const grid = buildGrid(rough('fixedPressure'));
  const [a, b] = [cellAt(grid, 1200, 1200), cellAt(grid, 4200, 3000)];

  it('in time-stepping, to round-off', () => {
    // Equal steps for both, so that they differ by round-off alone.
    const equal = { tolerancePa: Infinity, firstStepS: DAY_S, shareSinceChange: 1, longestStepS: DAY_S };
    const there = stepped(grid, a, 0.03, 60 * DAY_S, equal)[b];
    expect(stepped(grid, b, 0.03, 60 * DAY_S, equal)[a] / there).toBeCloseTo(1, 9);
  });

  it('in the response library, to its accuracy', () => {
    const own = byLibrary(grid, a, [[0, 0.03]], 60 * DAY_S);
    const there = own[b];
    const back = byLibrary(grid, b, [[0, 0.03]], 60 * DAY_S)[a];
    expect(Math.abs(back - there)).toBeLessThan(1e-4 * own[a]);
  });
});

describe('scaling', () => {
  const reservoir = rough('fixedPressure');
  const at = (changes: Partial<ReservoirSpec>, timeS: number) => {
    const grid = buildGrid({ ...reservoir, ...changes });
    return byLibrary(grid, cellAt(grid, 1200, 1200), [[0, 0.03]], timeS);
  };
  const worst = (found: Float64Array, expected: Float64Array) => {
    const largest = expected.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    return found.reduce((most, value, cell) => Math.max(most, Math.abs(value - expected[cell])), 0) / largest;
  };

  // With p = S(t) for k and φc_t: both sides of the diffusion equation divided by the factor.
  it('three times the permeability: a third of the pressure of three times the time', () => {
    const found = at({ permeabilityM2: 3 * reservoir.permeabilityM2 }, 20 * DAY_S);
    const expected = at({}, 60 * DAY_S).map((value) => value / 3);
    expect(worst(found, expected)).toBeLessThan(1e-4);
  });

  it('twice the storage: the pressure of half the time', () => {
    const found = at({ storagePerPa: 2 * reservoir.storagePerPa }, 60 * DAY_S);
    expect(worst(found, at({}, 30 * DAY_S))).toBeLessThan(1e-4);
  });
});

describe('the response library against refined time-stepping', () => {
  it.each(['noFlow', 'fixedPressure'] as const)('within 0.1 percent at days 1, 7, 84 and 168: %s', (kind) => {
    const grid = buildGrid(rough(kind));
    for (const cell of [cellAt(grid, 1200, 1200), cellAt(grid, 4200, 3000)]) {
      for (const day of [1, 7, 84, 168]) {
        const exact = stepped(grid, cell, 0.03, day * DAY_S);
        const found = byLibrary(grid, cell, [[0, 0.03]], day * DAY_S);
        const worst = exact.reduce((most, value, at) => Math.max(most, Math.abs(found[at] - value)), 0);
        expect(worst / Math.abs(exact[cell]), `day ${day}`).toBeLessThan(1e-3);
      }
    }
  });

  it('its error estimate is not below the error', () => {
    const grid = buildGrid(rough('fixedPressure'));
    const cell = cellAt(grid, 1200, 1200);
    const { wells } = buildResponseLibrary(new DiffusionOperator(grid), [cell], { longestS: 200 * DAY_S });
    const exact = stepped(grid, cell, 1, 7 * DAY_S);
    const found = byLibrary(grid, cell, [[0, 1]], 7 * DAY_S);
    const worst = exact.reduce((most, value, at) => Math.max(most, Math.abs(found[at] - value)), 0);
    // The stepping itself is good to about 1e-5.
    expect(worst / exact[cell]).toBeLessThan(wells[0].errorEstimate + 2e-5);
  });
});
