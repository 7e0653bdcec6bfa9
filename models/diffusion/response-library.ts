/**
 * The response library: each well's pressure answer to a unit rate, at all times at once.
 *
 *   M p' = −A p + b_j q_j(t)   →   p(x, t) = Σ_j Σ_k φ_jk(x) a_jk(t),   a_jk' = −λ_jk a_jk + β_jk q_j
 *
 * Each well has its own short list of modes φ_jk (M-orthonormal Ritz vectors) with decay rates λ_jk, so a
 * history of constant-rate steps moves the amplitudes exactly, and a unit step answers with
 * S_j(x, t) = Σ_k φ_jk(x) β_jk (1 − e^{−λ t})/λ.
 *
 * Method    Galerkin projection on a rational Krylov space: repeated solves with (M + γA), γ cycling through
 *           five values spread evenly in the logarithm over the times of interest, full
 *           reorthogonalisation in the M inner product. Cycles are added until the unit responses of the
 *           last two agree. Five values instead of one keep hours and years accurate together.
 * Source    van den Eshof & Hochbruck (2006), SIAM J. Sci. Comput. 27(4), 1438–1457 (shift-and-invert);
 *           Druskin, Knizhnerman & Zaslavsky (2009), SIAM J. Sci. Comput. 31(5), 3760–3780 (rational Krylov,
 *           symmetric diffusion); Güttel (2013), GAMM-Mitt. 36(1), 8–31 (Galerkin extraction).
 * Units     φ 1/√(m³/Pa) · λ 1/s · β 1/√(m³/Pa) · a √(m³/Pa)·Pa
 * Shapes    modes: one Float64Array(cells × modes) per well, row-major by cell
 * Limits    an accuracy that is not reached within the allowed cycles throws NumericalError
 */
import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

import { SECONDS_PER_DAY } from '../constants';
import { NumericalError, StoppedError } from '../errors';
import type { DiffusionOperator } from './operator';

export interface WellResponse {
  cell: number;
  count: number;
  /** φ_k(cell), row-major: modes[cell*count + k]. */
  modes: Float64Array;
  /** λ_k ≥ 0. */
  decayPerS: Float64Array;
  /** β_k: how a unit rate feeds each mode. */
  input: Float64Array;
  /**
   * Difference between the last two cycles relative to the largest value of the unit response, worst over the
   * check times: an upper estimate, since the error itself is about that of the last cycle (several times less).
   */
  errorEstimate: number;
}

export interface ResponseLibrary {
  cells: number;
  wells: WellResponse[];
}

export interface LibraryOptions {
  /** Shortest and longest time that is asked of the responses. */
  shortestS?: number;
  longestS: number;
  tolerance?: number;
  onProgress?: (fraction: number) => void;
  shouldStop?: () => boolean;
}

const SHIFTS = 5;
const MOST_CYCLES = 9;

export function buildResponseLibrary(
  operator: DiffusionOperator,
  wellCells: readonly number[],
  options: LibraryOptions,
): ResponseLibrary {
  const shortestS = options.shortestS ?? SECONDS_PER_DAY / 24;
  const longestS = Math.max(options.longestS, 2 * shortestS);
  // The slowest shift reaches past the longest time: what has settled by then must be exact as well.
  const shiftsS = spread(shortestS / 2, 2 * longestS, SHIFTS);
  const checkTimesS = spread(shortestS, longestS, 7);
  const byCell = new Map<number, WellResponse>();
  const wells = wellCells.map((cell, index) => {
    if (options.shouldStop?.()) throw new StoppedError();
    let response = byCell.get(cell); // two wells in one cell answer alike
    if (!response) {
      response = buildWellResponse(operator, cell, shiftsS, checkTimesS, options.tolerance ?? 3e-4);
      byCell.set(cell, response);
    }
    options.onProgress?.((index + 1) / wellCells.length);
    return response;
  });
  operator.releaseFactors();
  return { cells: operator.size, wells };
}

function spread(from: number, to: number, count: number): number[] {
  return Array.from({ length: count }, (_, index) => from * (to / from) ** (index / (count - 1)));
}

function buildWellResponse(
  operator: DiffusionOperator,
  cell: number,
  shiftsS: readonly number[],
  checkTimesS: readonly number[],
  tolerance: number,
): WellResponse {
  const { size, grid } = operator;
  const root = grid.storageM3PerPa.map(Math.sqrt); // √M turns the M inner product into the plain one
  const basis: Float64Array[] = []; // orthonormal, entries √M·φ
  const images: Float64Array[] = []; // √M⁻¹ A √M⁻¹ applied to each
  const projected: number[][] = []; // the symmetric projection of the operator, lower triangle
  const applied = new Float64Array(size);

  // A closed reservoir keeps its mean pressure: with the constant in the basis, mass is kept exactly.
  if (!grid.hasFixedPressure) addVector(root.slice());
  let last = new Float64Array(size);
  last[cell] = 1;
  let previous: (Float64Array | null)[] = checkTimesS.map(() => null);
  let errorEstimate = Infinity;
  let eigen: ReturnType<typeof decompose> = { values: new Float64Array(0), vectors: Matrix.zeros(0, 0) };
  let exhausted = false;

  for (let cycle = 0; cycle < MOST_CYCLES && !exhausted; cycle++) {
    for (const shiftS of shiftsS) {
      const next = last;
      operator.solveShifted(shiftS, next);
      for (let i = 0; i < size; i++) next[i] *= root[i];
      if (!addVector(next)) {
        exhausted = true; // the space holds the answer already
        break;
      }
      const newest = basis[basis.length - 1];
      last = new Float64Array(size);
      for (let i = 0; i < size; i++) last[i] = newest[i] * root[i];
    }
    eigen = decompose(projected);
    if (cycle === 0 && !exhausted) {
      previous = checkTimesS.map((timeS) => stepResponse(timeS));
      continue;
    }
    errorEstimate = 0;
    checkTimesS.forEach((timeS, at) => {
      const now = stepResponse(timeS);
      const before = previous[at];
      let largest = 0;
      let difference = 0;
      for (let i = 0; i < size; i++) {
        largest = Math.max(largest, Math.abs(now[i]));
        if (before) difference = Math.max(difference, Math.abs(now[i] - before[i]));
      }
      errorEstimate = Math.max(errorEstimate, difference / largest);
      previous[at] = now;
    });
    if (errorEstimate <= tolerance) break;
  }
  if (errorEstimate > tolerance && !exhausted) {
    throw new NumericalError('the response library did not reach its accuracy', { errorEstimate, cell });
  }

  const count = basis.length;
  const decayPerS = eigen.values;
  const modes = new Float64Array(size * count);
  const weights = new Float64Array(count * count); // weights[a*count + k]
  for (let a = 0; a < count; a++)
    for (let k = 0; k < count; k++) weights[a * count + k] = eigen.vectors.get(a, k);
  for (let i = 0; i < size; i++) {
    const row = i * count;
    for (let a = 0; a < count; a++) {
      const entry = basis[a][i] / root[i];
      for (let k = 0; k < count; k++) modes[row + k] += entry * weights[a * count + k];
    }
  }
  const input = modes.slice(cell * count, (cell + 1) * count);
  return { cell, count, modes, decayPerS, input, errorEstimate };

  /** Adds a vector after orthogonalising it twice; false where nothing new is left of it. */
  function addVector(vector: Float64Array): boolean {
    const before = norm(vector);
    for (let pass = 0; pass < 2; pass++) {
      for (const other of basis) {
        let dot = 0;
        for (let i = 0; i < size; i++) dot += other[i] * vector[i];
        for (let i = 0; i < size; i++) vector[i] -= dot * other[i];
      }
    }
    const after = norm(vector);
    if (!(after > 1e-11 * before)) return false;
    for (let i = 0; i < size; i++) vector[i] /= after;
    const image = new Float64Array(size);
    for (let i = 0; i < size; i++) applied[i] = vector[i] / root[i];
    operator.apply(applied, image);
    for (let i = 0; i < size; i++) image[i] /= root[i];
    basis.push(vector);
    images.push(image);
    projected.push(
      basis.map((other) => {
        let dot = 0;
        for (let i = 0; i < size; i++) dot += other[i] * image[i];
        return dot;
      }),
    );
    return true;
  }

  function stepResponse(timeS: number): Float64Array {
    const count = eigen.values.length;
    const along = new Float64Array(count);
    for (let k = 0; k < count; k++) {
      let feed = 0;
      for (let a = 0; a < count; a++) feed += eigen.vectors.get(a, k) * (basis[a][cell] / root[cell]);
      feed *= stepFactor(eigen.values[k], timeS);
      for (let a = 0; a < count; a++) along[a] += eigen.vectors.get(a, k) * feed;
    }
    const response = new Float64Array(size);
    for (let a = 0; a < count; a++) {
      const vector = basis[a];
      const weight = along[a];
      for (let i = 0; i < size; i++) response[i] += weight * vector[i];
    }
    for (let i = 0; i < size; i++) response[i] /= root[i];
    return response;
  }
}

function norm(vector: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < vector.length; i++) sum += vector[i] * vector[i];
  return Math.sqrt(sum);
}

function decompose(lowerTriangle: number[][]): { values: Float64Array; vectors: Matrix } {
  const count = lowerTriangle.length;
  const matrix = Matrix.zeros(count, count);
  lowerTriangle.forEach((row, a) =>
    row.forEach((entry, b) => {
      matrix.set(a, b, entry);
      matrix.set(b, a, entry);
    }),
  );
  const eigen = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
  // The operator is semidefinite; what lies below zero is round-off.
  return {
    values: Float64Array.from(eigen.realEigenvalues, (value) => Math.max(0, value)),
    vectors: eigen.eigenvectorMatrix,
  };
}

/** (1 − e^{−λt})/λ, t for λ → 0: the amplitude of a mode after a unit rate has acted for t. */
export function stepFactor(decayPerS: number, timeS: number): number {
  if (timeS <= 0) return 0;
  const exponent = decayPerS * timeS;
  return exponent < 1e-12 ? timeS : -Math.expm1(-exponent) / decayPerS;
}
