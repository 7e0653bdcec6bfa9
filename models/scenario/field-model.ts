/**
 * A scenario made ready to compute with: grid, response library, background, history.
 *
 * Rates leave the file as magnitudes; from here on they are signed, injection positive.
 */
import { SECONDS_PER_WEEK } from '../constants';
import { buildResponseLibrary, type ResponseLibrary } from '../diffusion/response-library';
import { DiffusionOperator } from '../diffusion/operator';
import type { RateStep } from '../diffusion/amplitudes';
import { buildGrid, cellAt, type Grid } from '../grid/grid';
import { buildBackground, type Background } from '../seismicity/background';
import { rateStateParameters, type RateStateParameters } from '../seismicity/rate-state';
import { wellDrawdownPaPerM3PerS } from '../wells/peaceman';
import type { Scenario, WellSpec } from './types';

export interface Hooks {
  /** Fraction done (0 … 1) and what is being done, in plain words. */
  onProgress?: (fraction: number, step: string) => void;
  shouldStop?: () => boolean;
  /** Seconds on any steady clock; only differences are used. Models have no clock of their own. */
  now?: () => number;
}

export interface FieldModel {
  scenario: Scenario;
  grid: Grid;
  operator: DiffusionOperator;
  library: ResponseLibrary;
  background: Background;
  rateState: RateStateParameters;
  wells: WellModel[];
  /** Start of the earliest history step, s before the plan (≤ 0). */
  historyStartS: number;
  /** Plan weeks plus look-ahead. */
  totalWeeks: number;
  warnings: string[];
}

export interface WellModel {
  spec: WellSpec;
  cell: number;
  /** +1 injector, −1 producer. */
  sign: 1 | -1;
  /** Signed history, ascending. */
  history: RateStep[];
  /** The last measured rate, a magnitude. */
  lastRateM3PerS: number;
  /** Bottom-hole overpressure beyond the cell's, per unit of injection. */
  drawdownPaPerM3PerS: number;
}

export function buildFieldModel(scenario: Scenario, totalWeeks: number, hooks: Hooks = {}): FieldModel {
  const grid = buildGrid(scenario.reservoir);
  const operator = new DiffusionOperator(grid);
  const historyOf = new Map(scenario.history.map((entry) => [entry.well, entry.steps]));
  const wells = scenario.wells.map((spec): WellModel => {
    const sign = spec.kind === 'injector' ? 1 : -1;
    const cell = cellAt(grid, spec.xM, spec.yM);
    const steps = [...(historyOf.get(spec.name) ?? [])].sort((a, b) => a.fromS - b.fromS);
    return {
      spec,
      cell,
      sign,
      history: steps.map((step) => ({ fromS: step.fromS, rateM3PerS: sign * step.rateM3PerS })),
      lastRateM3PerS: steps.length > 0 ? steps[steps.length - 1].rateM3PerS : 0,
      drawdownPaPerM3PerS: wellDrawdownPaPerM3PerS({
        dxM: grid.dxM,
        dyM: grid.dyM,
        radiusM: spec.radiusM,
        skin: spec.skin,
        transmissivity: grid.transmissivity[cell],
      }),
    };
  });
  const historyStartS = Math.min(
    0,
    ...wells.flatMap((well) => well.history.slice(0, 1).map((step) => step.fromS)),
  );
  const library = buildResponseLibrary(
    operator,
    wells.map((well) => well.cell),
    {
      longestS: totalWeeks * SECONDS_PER_WEEK - historyStartS,
      shouldStop: hooks.shouldStop,
      onProgress: (fraction) => hooks.onProgress?.(fraction, 'Computing how each well moves the pressure'),
    },
  );
  return {
    scenario,
    grid,
    operator,
    library,
    background: buildBackground(grid, scenario.seismicity),
    rateState: rateStateParameters(scenario.seismicity),
    wells,
    historyStartS,
    totalWeeks,
    warnings: modelWarnings(grid, wells),
  };
}

function modelWarnings(grid: Grid, wells: readonly WellModel[]): string[] {
  const warnings: string[] = [];
  const ownerOf = new Map<number, string>();
  for (const { spec, cell } of wells) {
    const other = ownerOf.get(cell);
    if (other) {
      warnings.push(
        `${spec.name} and ${other} share a grid cell: their bottom-hole pressures are less exact; use a finer grid.`,
      );
    }
    ownerOf.set(cell, spec.name);
    const ix = cell % grid.nx;
    const iy = (cell - ix) / grid.nx;
    if (ix === 0 || iy === 0 || ix === grid.nx - 1 || iy === grid.ny - 1) {
      warnings.push(
        `${spec.name} lies in a cell on the edge of the model: its bottom-hole pressure is less exact.`,
      );
    }
  }
  return warnings;
}
