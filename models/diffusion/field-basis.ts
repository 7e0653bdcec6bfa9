/**
 * All wells' modes side by side for the cells that matter, with each well's list cut down to what the times
 * at hand can excite.
 *
 *   p(x, t) = Σ_j Σ_k ψ_jk(x) c_jk(t),   ψ_j = φ_j U_j,  c_j = U_jᵀ a_j
 *
 * Method    U_j: leading eigenvectors of the Gram matrix of sampled amplitudes, each sample scaled to one, so
 *           that the answer an hour after a change counts as much as the answer after years. The modes are
 *           M-orthonormal: what is cut is the mean-square error over the reservoir.
 * Source    Proper orthogonal decomposition: Sirovich (1987), Quart. Appl. Math. 45(3), 561–571.
 * Shapes    psi: Float64Array(cells × width), row-major; a well's part starts at wells[j].offset
 */
import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

import type { ResponseLibrary } from './response-library';

export interface FieldBasis {
  /** Grid indices of the rows of psi. */
  cells: Int32Array;
  width: number;
  psi: Float64Array;
  wells: { offset: number; width: number; reduce: Float64Array }[];
}

/** Mean-square error left out, relative to each sample. */
const TOLERANCE = 2e-5;

/**
 * @param samples per well, rows of amplitudes (rows × modes) that the basis must be able to hold
 */
export function buildFieldBasis(
  library: ResponseLibrary,
  cells: Int32Array,
  samples: readonly Float64Array[][],
): FieldBasis {
  let width = 0;
  const wells = library.wells.map((well, j) => {
    const reduce = leadingDirections(samples[j], well.count);
    const part = { offset: width, width: reduce.length / well.count, reduce };
    width += part.width;
    return part;
  });
  const psi = new Float64Array(cells.length * width);
  library.wells.forEach((well, j) => {
    const { offset, width: own, reduce } = wells[j];
    const { count, modes } = well;
    for (let row = 0; row < cells.length; row++) {
      const from = cells[row] * count;
      const to = row * width + offset;
      for (let k = 0; k < count; k++) {
        const entry = modes[from + k];
        for (let d = 0; d < own; d++) psi[to + d] += entry * reduce[k * own + d];
      }
    }
  });
  return { cells, width, psi, wells };
}

/** Writes Uᵀa of every row of amplitudes of one well into its part of the rows of coefficients. */
export function reduceAmplitudes(
  basis: FieldBasis,
  wellIndex: number,
  rows: Float64Array,
  scale: number,
  out: Float64Array,
): void {
  const { offset, width: own, reduce } = basis.wells[wellIndex];
  const count = own === 0 ? 0 : reduce.length / own;
  for (let row = 0; row * basis.width < out.length; row++) {
    const to = row * basis.width + offset;
    for (let d = 0; d < own; d++) {
      let sum = 0;
      for (let k = 0; k < count; k++) sum += rows[row * count + k] * reduce[k * own + d];
      out[to + d] = scale * sum;
    }
  }
}

/** Directions as columns, row-major (modes × directions). */
function leadingDirections(samples: readonly Float64Array[], count: number): Float64Array {
  const gram = Matrix.zeros(count, count);
  let rows = 0;
  for (const block of samples) {
    for (let start = 0; start < block.length; start += count) {
      let norm = 0;
      for (let k = 0; k < count; k++) norm += block[start + k] ** 2;
      if (norm === 0) continue;
      rows++;
      for (let a = 0; a < count; a++) {
        const scaled = block[start + a] / norm;
        for (let b = 0; b <= a; b++) gram.set(a, b, gram.get(a, b) + scaled * block[start + b]);
      }
    }
  }
  if (rows === 0) return new Float64Array(0);
  for (let a = 0; a < count; a++) for (let b = 0; b < a; b++) gram.set(b, a, gram.get(a, b));
  const eigen = new EigenvalueDecomposition(gram, { assumeSymmetric: true });
  const order = eigen.realEigenvalues
    .map((value, index) => ({ value, index }))
    .sort((a, b) => b.value - a.value);
  let keep = 0;
  while (keep < count && order[keep].value > TOLERANCE ** 2 * rows) keep++;
  const directions = new Float64Array(count * keep);
  for (let d = 0; d < keep; d++) {
    for (let k = 0; k < count; k++) directions[k * keep + d] = eigen.eigenvectorMatrix.get(k, order[d].index);
  }
  return directions;
}
