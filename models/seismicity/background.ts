/**
 * Where the background rate lies: zones by weight, one weight for elsewhere.
 *
 *   r₀(x) = total background rate · weight(x) / ∫ weight
 *
 * Units     events/s of M ≥ completeness, per cell
 */
import { SECONDS_PER_YEAR } from '../constants';
import { cellCentre, type Grid } from '../grid/grid';
import { isInsidePolygon } from '../grid/polygon';
import type { SeismicitySpec } from '../scenario/types';

export interface Background {
  /** Cells with a background rate above 0, zone by zone, elsewhere last. */
  cells: Int32Array;
  /** Rate of each of these cells, events/s. */
  ratePerS: Float64Array;
  /** First index into `cells` of each group (zones in order, then elsewhere), and the end. */
  groupStart: Int32Array;
  /** Rate of each group, events/s. */
  groupRatePerS: Float64Array;
  totalPerS: number;
}

export function buildBackground(grid: Grid, seismicity: SeismicitySpec): Background {
  const { zones } = seismicity;
  const groups: number[][] = Array.from({ length: zones.length + 1 }, () => []);
  for (let cell = 0; cell < grid.nx * grid.ny; cell++) {
    const [x, y] = cellCentre(grid, cell);
    let group = zones.length;
    zones.forEach((zone, index) => {
      if (isInsidePolygon(x, y, zone.polygonM)) group = index;
    });
    groups[group].push(cell);
  }
  const weights = [...zones.map((zone) => zone.weight), seismicity.elsewhereWeight];
  const total = groups.reduce((sum, cells, group) => sum + cells.length * weights[group], 0);
  const totalPerS = seismicity.backgroundEventsPerYear / SECONDS_PER_YEAR;
  const cells: number[] = [];
  const ratePerS: number[] = [];
  const groupStart = [0];
  const groupRatePerS: number[] = [];
  groups.forEach((members, group) => {
    const rate = (totalPerS * weights[group]) / total;
    if (rate > 0) {
      for (const cell of members) {
        cells.push(cell);
        ratePerS.push(rate);
      }
    }
    groupStart.push(cells.length);
    groupRatePerS.push(rate * members.length);
  });
  return {
    cells: Int32Array.from(cells),
    ratePerS: Float64Array.from(ratePerS),
    groupStart: Int32Array.from(groupStart),
    groupRatePerS: Float64Array.from(groupRatePerS),
    totalPerS,
  };
}
