/**
 * Sparse Cholesky factorisation P K Pᵀ = L Lᵀ of a symmetric positive definite matrix.
 *
 * Method    Elimination tree, row patterns by tree reach, up-looking numeric phase.
 * Source    Davis T.A. (2006), Direct Methods for Sparse Linear Systems, SIAM, ch. 4 (cs_etree, cs_ereach, cs_chol).
 * Shapes    upper triangle by columns of the permuted matrix; L by columns, diagonal first in each column
 * Limits    a matrix that is not positive definite throws NumericalError
 */
import { NumericalError } from '../errors';

/** Upper triangle (diagonal included) of a symmetric matrix, column by column. */
export interface UpperTriangle {
  size: number;
  columnStart: Int32Array;
  rowIndex: Int32Array;
  value: Float64Array;
}

/** What depends on the pattern alone; shared by all matrices of that pattern. */
export interface SymbolicFactor {
  size: number;
  parent: Int32Array;
  columnStart: Int32Array;
}

export interface CholeskyFactor {
  size: number;
  columnStart: Int32Array;
  rowIndex: Int32Array;
  value: Float64Array;
}

export function analyse(matrix: UpperTriangle): SymbolicFactor {
  const { size, columnStart, rowIndex } = matrix;
  const parent = new Int32Array(size).fill(-1);
  const ancestor = new Int32Array(size).fill(-1);
  for (let column = 0; column < size; column++) {
    for (let entry = columnStart[column]; entry < columnStart[column + 1]; entry++) {
      let row = rowIndex[entry];
      while (row !== -1 && row < column) {
        const up = ancestor[row];
        ancestor[row] = column;
        if (up === -1) parent[row] = column;
        row = up;
      }
    }
  }
  const count = new Int32Array(size).fill(1);
  const mark = new Int32Array(size).fill(-1);
  for (let column = 0; column < size; column++) {
    mark[column] = column;
    for (let entry = columnStart[column]; entry < columnStart[column + 1]; entry++) {
      for (let row = rowIndex[entry]; row < column && mark[row] !== column; row = parent[row]) {
        mark[row] = column;
        count[row]++;
      }
    }
  }
  const start = new Int32Array(size + 1);
  for (let column = 0; column < size; column++) start[column + 1] = start[column] + count[column];
  return { size, parent, columnStart: start };
}

export function factorise(matrix: UpperTriangle, symbolic: SymbolicFactor): CholeskyFactor {
  const { size } = matrix;
  const { parent, columnStart: start } = symbolic;
  const rowIndex = new Int32Array(start[size]);
  const value = new Float64Array(start[size]);
  const filled = new Int32Array(size); // next free slot of each column of L
  const work = new Float64Array(size); // row k of L before it is stored
  const stack = new Int32Array(size);
  const mark = new Int32Array(size).fill(-1);
  for (let k = 0; k < size; k++) {
    // The pattern of row k: the part of the elimination tree below k that the entries of column k reach.
    let top = size;
    let diagonal = 0;
    mark[k] = k;
    for (let entry = matrix.columnStart[k]; entry < matrix.columnStart[k + 1]; entry++) {
      const row = matrix.rowIndex[entry];
      if (row === k) {
        diagonal = matrix.value[entry];
        continue;
      }
      work[row] = matrix.value[entry];
      let length = 0;
      let node = row;
      for (; mark[node] !== k; node = parent[node]) {
        stack[length++] = node;
        mark[node] = k;
      }
      while (length > 0) stack[--top] = stack[--length];
    }
    for (; top < size; top++) {
      const column = stack[top];
      const first = start[column];
      const factor = work[column] / value[first];
      work[column] = 0;
      const end = filled[column];
      for (let slot = first + 1; slot < end; slot++) work[rowIndex[slot]] -= value[slot] * factor;
      diagonal -= factor * factor;
      rowIndex[end] = k;
      value[end] = factor;
      filled[column] = end + 1;
    }
    if (!(diagonal > 0))
      throw new NumericalError(`matrix is not positive definite at pivot ${k}`, { pivot: diagonal });
    rowIndex[start[k]] = k;
    value[start[k]] = Math.sqrt(diagonal);
    filled[k] = start[k] + 1;
  }
  return { size, columnStart: start, rowIndex, value };
}

/** Solves L Lᵀ x = b in place, in the permuted order. */
export function solveInPlace(factor: CholeskyFactor, x: Float64Array): void {
  const { size, columnStart, rowIndex, value } = factor;
  for (let column = 0; column < size; column++) {
    const first = columnStart[column];
    const end = columnStart[column + 1];
    const xColumn = x[column] / value[first];
    x[column] = xColumn;
    if (xColumn !== 0)
      for (let slot = first + 1; slot < end; slot++) x[rowIndex[slot]] -= value[slot] * xColumn;
  }
  for (let column = size - 1; column >= 0; column--) {
    const first = columnStart[column];
    const end = columnStart[column + 1];
    let sum = x[column];
    for (let slot = first + 1; slot < end; slot++) sum -= value[slot] * x[rowIndex[slot]];
    x[column] = sum / value[first];
  }
}
