/**
 * The stress field of all wells' modes, cut down block by block of neighbouring cells.
 *
 *   g(x, t) = Σ_k φ_k(x) c_k(t)  ≈  Σ_r q_r(x) d_r(t),   d = mix · c   for x in a block
 *
 * Seen from a few hundred cells, hundreds of modes look like a few dozen smooth shapes: the products over cells
 * and times, where a search spends its time, shrink by as much.
 *
 * Method    Column-pivoted Gram–Schmidt of each block's mode values, every column scaled by the largest coefficient
 *           that the times at hand can give it, until what is left adds less than TOLERANCE to g (root mean
 *           square over the block, all coefficients at their largest).
 * Source    Golub & Van Loan (2013), Matrix Computations, 4th ed., §5.4.2 (QR with column pivoting), §5.2.8 (modified
 *           Gram–Schmidt).
 * Shapes    coefficients: Float64Array(times × width), row-major, a well's modes from offsets[well] on
 */
import type { WellResponse } from './response-library';

export interface FieldBlock {
  /** First row of the block and the one after its last. */
  first: number;
  end: number;
  rank: number;
  /** q: Float64Array(rows × rank), row-major. */
  shapes: Float64Array;
  /** Float64Array(rank × width), row-major. */
  mix: Float64Array;
}

export interface FieldBasis {
  width: number;
  offsets: number[];
  blocks: FieldBlock[];
}

/** Of g. */
const TOLERANCE = 1e-4;

/**
 * @param cells grid indices of the rows
 * @param blockStart first row of each block, and the end
 * @param largest per well and mode, the largest |c| that occurs
 */
export function buildFieldBasis(
  wells: readonly WellResponse[],
  cells: Int32Array,
  blockStart: Int32Array,
  largest: readonly Float64Array[],
): FieldBasis {
  const offsets: number[] = [];
  let width = 0;
  for (const well of wells) {
    offsets.push(width);
    width += well.count;
  }
  const scale = new Float64Array(width);
  largest.forEach((values, j) => scale.set(values, offsets[j]));
  const blocks: FieldBlock[] = [];
  for (let block = 0; block + 1 < blockStart.length; block++) {
    const rows = cells.subarray(blockStart[block], blockStart[block + 1]);
    const columns = scaledModes(wells, offsets, rows, scale);
    blocks.push({
      first: blockStart[block],
      end: blockStart[block + 1],
      ...compress(columns, rows.length, scale),
    });
  }
  return { width, offsets, blocks };
}

/** d = mix · c for each time: Float64Array(times × rank). */
export function mixCoefficients(
  { rank, mix }: FieldBlock,
  coefficients: Float64Array,
  width: number,
): Float64Array {
  const times = coefficients.length / width;
  const mixed = new Float64Array(times * rank);
  for (let r = 0; r < rank; r += 2) {
    const next = Math.min(r + 1, rank - 1);
    const row = r * width;
    const rowNext = next * width;
    for (let time = 0; time < times; time++) {
      const from = time * width;
      let a = 0;
      let b = 0;
      for (let k = 0; k < width; k++) {
        const c = coefficients[from + k];
        a += mix[row + k] * c;
        b += mix[rowNext + k] * c;
      }
      mixed[time * rank + r] = a;
      mixed[time * rank + next] = b;
    }
  }
  return mixed;
}

/** gradient += mixᵀ · byMixed for each time: the adjoint of `mixCoefficients`. */
export function addMixedGradient(
  { rank, mix }: FieldBlock,
  byMixed: Float64Array,
  gradient: Float64Array,
  width: number,
): void {
  const times = gradient.length / width;
  for (let r = 0; r < rank; r += 2) {
    const hasNext = r + 1 < rank;
    const row = r * width;
    const rowNext = hasNext ? row + width : row;
    for (let time = 0; time < times; time++) {
      const a = byMixed[time * rank + r];
      const b = hasNext ? byMixed[time * rank + r + 1] : 0;
      const to = time * width;
      for (let k = 0; k < width; k++) gradient[to + k] += a * mix[row + k] + b * mix[rowNext + k];
    }
  }
}

/** Column-major: columns[k * rows + i] = φ_k(x_i) · scale_k. */
function scaledModes(
  wells: readonly WellResponse[],
  offsets: readonly number[],
  cells: Int32Array,
  scale: Float64Array,
): Float64Array {
  const rows = cells.length;
  const columns = new Float64Array(rows * scale.length);
  wells.forEach(({ count, modes }, j) => {
    for (let k = 0; k < count; k++) {
      const column = offsets[j] + k;
      for (let i = 0; i < rows; i++) columns[column * rows + i] = modes[cells[i] * count + k] * scale[column];
    }
  });
  return columns;
}

function compress(
  columns: Float64Array,
  rows: number,
  scale: Float64Array,
): { rank: number; shapes: Float64Array; mix: Float64Array } {
  const width = scale.length;
  const left = new Float64Array(width); // squared norm of what is left of each column
  for (let k = 0; k < width; k++) {
    for (let i = k * rows; i < (k + 1) * rows; i++) left[k] += columns[i] ** 2;
  }
  const shapes: Float64Array[] = [];
  const mix: Float64Array[] = [];
  const enough = TOLERANCE ** 2 * rows;
  while (shapes.length < rows) {
    let total = 0;
    let pivot = 0;
    for (let k = 0; k < width; k++) {
      total += left[k];
      if (left[k] > left[pivot]) pivot = k;
    }
    if (total <= enough) break;
    const shape = columns.slice(pivot * rows, (pivot + 1) * rows);
    const row = new Float64Array(width);
    let norm = 0;
    for (let i = 0; i < rows; i++) norm += shape[i] ** 2;
    norm = Math.sqrt(norm);
    for (let i = 0; i < rows; i++) shape[i] /= norm;
    for (let k = 0; k < width; k++) {
      if (left[k] === 0) continue;
      const start = k * rows;
      let dot = 0;
      for (let i = 0; i < rows; i++) dot += shape[i] * columns[start + i];
      let rest = 0;
      for (let i = 0; i < rows; i++) {
        const entry = (columns[start + i] -= dot * shape[i]);
        rest += entry * entry;
      }
      left[k] = rest;
      row[k] = dot / scale[k];
    }
    left[pivot] = 0;
    shapes.push(shape);
    mix.push(row);
  }
  const rank = shapes.length;
  const rowMajor = new Float64Array(rows * rank);
  for (let r = 0; r < rank; r++) for (let i = 0; i < rows; i++) rowMajor[i * rank + r] = shapes[r][i];
  const packed = new Float64Array(rank * width);
  mix.forEach((row, r) => packed.set(row, r * width));
  return { rank, shapes: rowMajor, mix: packed };
}
