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

/** About so many parts share the background rate: a plan's search learns more from many small ones than from their sum. */
const PARTS = 16;
/** Cells of a block, at most: few enough to look alike, many enough to share the work. */
const BLOCK_CELLS = 256;

export interface Background {
  /** Cells with a background rate above 0, zone by zone, elsewhere last. */
  cells: Int32Array;
  /** Rate of each of these cells, events/s. */
  ratePerS: Float64Array;
  /** First index into `cells` of each group (zones in order, then elsewhere), and the end. */
  groupStart: Int32Array;
  /** Rate of each group, events/s. */
  groupRatePerS: Float64Array;
  /** First index into `cells` of each part (neighbouring cells of one group), and the end. */
  partStart: Int32Array;
  /** Group of each part. */
  partGroup: Int32Array;
  /** First index into `cells` of each block (close neighbours of one part), and the end. */
  blockStart: Int32Array;
  /** Part of each block. */
  blockPart: Int32Array;
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
  const partStart = [0];
  const partGroup: number[] = [];
  const blockStart = [0];
  const blockPart: number[] = [];
  groups.forEach((members, group) => {
    const rate = (totalPerS * weights[group]) / total;
    if (rate > 0 && members.length > 0) {
      const share = (rate * members.length) / totalPerS;
      for (const part of neighbourhoods(grid, members, Math.ceil(share * PARTS))) {
        for (const block of neighbourhoods(grid, part, Math.ceil(part.length / BLOCK_CELLS))) {
          for (const cell of block) {
            cells.push(cell);
            ratePerS.push(rate);
          }
          blockStart.push(cells.length);
          blockPart.push(partGroup.length);
        }
        partStart.push(cells.length);
        partGroup.push(group);
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
    partStart: Int32Array.from(partStart),
    partGroup: Int32Array.from(partGroup),
    blockStart: Int32Array.from(blockStart),
    blockPart: Int32Array.from(blockPart),
    totalPerS,
  };
}

/** Cells of a group in `count` neighbourhoods of about the same size, halved along their longer side in turn. */
function neighbourhoods(grid: Grid, cells: number[], count: number): number[][] {
  if (count <= 1 || cells.length <= 1) return [cells];
  const columns = cells.map((cell) => cell % grid.nx);
  const rows = cells.map((cell) => Math.floor(cell / grid.nx));
  const extent = (values: number[]) =>
    values.reduce((a, b) => Math.max(a, b)) - values.reduce((a, b) => Math.min(a, b));
  const isWide = extent(columns) * grid.dxM >= extent(rows) * grid.dyM;
  const along = (cell: number) => (isWide ? cell % grid.nx : Math.floor(cell / grid.nx));
  const sorted = [...cells].sort((a, b) => along(a) - along(b) || a - b);
  const left = Math.floor(count / 2);
  const cut = Math.round((sorted.length * left) / count);
  return [
    ...neighbourhoods(grid, sorted.slice(0, cut), left),
    ...neighbourhoods(grid, sorted.slice(cut), count - left),
  ];
}
