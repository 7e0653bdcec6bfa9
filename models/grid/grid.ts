/**
 * Cell-centred finite-volume grid of the reservoir with its conductances.
 *
 *   S ∂p/∂t = ∇·(T ∇p) + Σ q_j δ(x − x_j)   →   M p' = −A p + b,   T = k h/μ,  S = φ c_t h
 *
 * Method    Two-point fluxes, harmonic means of T on inner faces, a fixed-pressure side half a cell from the
 *           centre, a no-flow side nothing. Second order (tests/models/verification/mode-decay.convergence.test.ts).
 * Source    Aziz & Settari (1979), Petroleum Reservoir Simulation, §3 (block-centred grid, harmonic averaging).
 * Units     conductance m³/(Pa·s) · storage m³/Pa (of the whole cell)
 * Shapes    Float64Array(nx*ny), row-major, index = iy*nx + ix, cell centres
 */
import type { PointM, ReservoirSpec } from '../scenario/types';
import { crossesSegment, isInsidePolygon } from './polygon';

export interface Grid {
  nx: number;
  ny: number;
  dxM: number;
  dyM: number;
  /** k·h/μ of each cell. */
  transmissivity: Float64Array;
  /** φ·c_t·h·Δx·Δy of each cell. */
  storageM3PerPa: Float64Array;
  /** Conductance from cell (ix, iy) to (ix+1, iy); 0 on the last column. */
  eastM3PerPaS: Float64Array;
  /** Conductance from cell (ix, iy) to (ix, iy+1); 0 on the last row. */
  northM3PerPaS: Float64Array;
  /** Conductance from a cell to fixed-pressure sides. */
  sideM3PerPaS: Float64Array;
  /** Whether any side holds the pressure; without one the mean pressure is free. */
  hasFixedPressure: boolean;
}

export function cellCentre(grid: { nx: number; dxM: number; dyM: number }, cell: number): PointM {
  const ix = cell % grid.nx;
  const iy = (cell - ix) / grid.nx;
  return [(ix + 0.5) * grid.dxM, (iy + 0.5) * grid.dyM];
}

/** The cell that holds a point; a point on the far edge belongs to the last cell. */
export function cellAt(
  grid: { nx: number; ny: number; dxM: number; dyM: number },
  xM: number,
  yM: number,
): number {
  const ix = Math.min(grid.nx - 1, Math.max(0, Math.floor(xM / grid.dxM)));
  const iy = Math.min(grid.ny - 1, Math.max(0, Math.floor(yM / grid.dyM)));
  return iy * grid.nx + ix;
}

export function buildGrid(reservoir: ReservoirSpec): Grid {
  const { cellsX: nx, cellsY: ny, thicknessM, viscosityPaS } = reservoir;
  const dxM = reservoir.widthM / nx;
  const dyM = reservoir.heightM / ny;
  const cells = nx * ny;
  const transmissivity = new Float64Array(cells);
  const storageM3PerPa = new Float64Array(cells);
  for (let cell = 0; cell < cells; cell++) {
    const [x, y] = cellCentre({ nx, dxM, dyM }, cell);
    let permeability = reservoir.permeabilityM2;
    let storage = reservoir.storagePerPa;
    for (const region of reservoir.regions) {
      if (!isInsidePolygon(x, y, region.polygonM)) continue;
      permeability = reservoir.permeabilityM2 * region.permeabilityFactor;
      storage = reservoir.storagePerPa * region.storageFactor;
    }
    transmissivity[cell] = (permeability * thicknessM) / viscosityPaS;
    storageM3PerPa[cell] = storage * thicknessM * dxM * dyM;
  }

  const eastM3PerPaS = new Float64Array(cells);
  const northM3PerPaS = new Float64Array(cells);
  const sideM3PerPaS = new Float64Array(cells);
  const harmonic = (a: number, b: number) => (2 * a * b) / (a + b);
  const { boundary } = reservoir;
  for (let iy = 0; iy < ny; iy++) {
    for (let ix = 0; ix < nx; ix++) {
      const cell = iy * nx + ix;
      const own = transmissivity[cell];
      if (ix + 1 < nx) eastM3PerPaS[cell] = (harmonic(own, transmissivity[cell + 1]) * dyM) / dxM;
      if (iy + 1 < ny) northM3PerPaS[cell] = (harmonic(own, transmissivity[cell + nx]) * dxM) / dyM;
      const acrossX = (2 * own * dyM) / dxM;
      const acrossY = (2 * own * dxM) / dyM;
      if (ix === 0 && boundary.west === 'fixedPressure') sideM3PerPaS[cell] += acrossX;
      if (ix === nx - 1 && boundary.east === 'fixedPressure') sideM3PerPaS[cell] += acrossX;
      if (iy === 0 && boundary.south === 'fixedPressure') sideM3PerPaS[cell] += acrossY;
      if (iy === ny - 1 && boundary.north === 'fixedPressure') sideM3PerPaS[cell] += acrossY;
    }
  }
  const grid: Grid = {
    nx,
    ny,
    dxM,
    dyM,
    transmissivity,
    storageM3PerPa,
    eastM3PerPaS,
    northM3PerPaS,
    sideM3PerPaS,
    hasFixedPressure: Object.values(boundary).includes('fixedPressure'),
  };
  for (const barrier of reservoir.barriers) applyBarrier(grid, barrier.lineM, barrier.transmissibilityFactor);
  return grid;
}

/** Multiplies each face that the line crosses, once however often the line crosses it. */
function applyBarrier(grid: Grid, line: readonly PointM[], factor: number): void {
  const { nx, ny, dxM, dyM } = grid;
  const crossed = new Set<number>();
  for (let piece = 0; piece + 1 < line.length; piece++) {
    const start = line[piece];
    const end = line[piece + 1];
    // Only the cells round the piece can have a face that it crosses.
    const low = (a: number, b: number, size: number) => Math.max(0, Math.floor(Math.min(a, b) / size) - 1);
    const high = (a: number, b: number, size: number, count: number) =>
      Math.min(count - 1, Math.floor(Math.max(a, b) / size) + 1);
    for (let iy = low(start[1], end[1], dyM); iy <= high(start[1], end[1], dyM, ny); iy++) {
      for (let ix = low(start[0], end[0], dxM); ix <= high(start[0], end[0], dxM, nx); ix++) {
        const cell = iy * nx + ix;
        const centre = cellCentre(grid, cell);
        const east: PointM = [centre[0] + dxM, centre[1]];
        const north: PointM = [centre[0], centre[1] + dyM];
        if (ix + 1 < nx && crossesSegment(centre, east, start, end)) crossed.add(2 * cell);
        if (iy + 1 < ny && crossesSegment(centre, north, start, end)) crossed.add(2 * cell + 1);
      }
    }
  }
  for (const face of crossed) {
    const conductance = face % 2 === 0 ? grid.eastM3PerPaS : grid.northM3PerPaS;
    conductance[face >> 1] *= factor;
  }
}
