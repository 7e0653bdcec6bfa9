/**
 * The semi-discrete diffusion operator M p' = −A p + b and solves with M + γA.
 *
 * A is symmetric and positive semidefinite (definite with a fixed-pressure side), M is diagonal.
 *
 * Units     A m³/(Pa·s) · M m³/Pa · γ s · b m³/s
 * Shapes    vectors Float64Array(nx*ny) in grid order
 */
import type { Grid } from '../grid/grid';
import { nestedDissection } from '../linalg/nested-dissection';
import {
  analyse,
  factorise,
  solveInPlace,
  type CholeskyFactor,
  type SymbolicFactor,
  type UpperTriangle,
} from '../linalg/sparse-cholesky';

export class DiffusionOperator {
  readonly size: number;
  private readonly order: Int32Array; // position → cell
  private readonly upper: UpperTriangle; // pattern; `value` is A
  private readonly diagonalEntry: Int32Array; // where the diagonal of each column stands
  private readonly symbolic: SymbolicFactor;
  private readonly factors = new Map<number, CholeskyFactor>();
  private readonly scratch: Float64Array;

  constructor(readonly grid: Grid) {
    const { nx, ny } = grid;
    this.size = nx * ny;
    this.scratch = new Float64Array(this.size);
    this.order = nestedDissection(nx, ny);
    const position = new Int32Array(this.size);
    this.order.forEach((cell, at) => (position[cell] = at));
    const columnStart = new Int32Array(this.size + 1);
    const rowIndex = new Int32Array(3 * this.size + 2);
    const value = new Float64Array(3 * this.size + 2);
    this.diagonalEntry = new Int32Array(this.size);
    let entry = 0;
    for (let column = 0; column < this.size; column++) {
      const cell = this.order[column];
      const ix = cell % nx;
      const neighbours: [number, number][] = [];
      if (ix > 0) neighbours.push([cell - 1, grid.eastM3PerPaS[cell - 1]]);
      if (ix + 1 < nx) neighbours.push([cell + 1, grid.eastM3PerPaS[cell]]);
      if (cell >= nx) neighbours.push([cell - nx, grid.northM3PerPaS[cell - nx]]);
      if (cell + nx < this.size) neighbours.push([cell + nx, grid.northM3PerPaS[cell]]);
      let diagonal = grid.sideM3PerPaS[cell];
      for (const [neighbour, conductance] of neighbours) {
        diagonal += conductance;
        if (position[neighbour] < column) {
          rowIndex[entry] = position[neighbour];
          value[entry++] = -conductance;
        }
      }
      this.diagonalEntry[column] = entry;
      rowIndex[entry] = column;
      value[entry++] = diagonal;
      columnStart[column + 1] = entry;
    }
    this.upper = {
      size: this.size,
      columnStart,
      rowIndex: rowIndex.slice(0, entry),
      value: value.slice(0, entry),
    };
    this.symbolic = analyse(this.upper);
  }

  /** Number of entries of a factor: what a solve costs. */
  get factorEntries(): number {
    return this.symbolic.columnStart[this.size];
  }

  /** x ← (M + γA)⁻¹ x; the factor is kept for the next call with the same γ. */
  solveShifted(gammaS: number, x: Float64Array): void {
    let factor = this.factors.get(gammaS);
    if (!factor) {
      const value = this.upper.value.map((entry) => entry * gammaS);
      for (let column = 0; column < this.size; column++) {
        value[this.diagonalEntry[column]] += this.grid.storageM3PerPa[this.order[column]];
      }
      factor = factorise({ ...this.upper, value }, this.symbolic);
      this.factors.set(gammaS, factor);
    }
    const { order, scratch, size } = this;
    for (let at = 0; at < size; at++) scratch[at] = x[order[at]];
    solveInPlace(factor, scratch);
    for (let at = 0; at < size; at++) x[order[at]] = scratch[at];
  }

  /** out ← A x */
  apply(x: Float64Array, out: Float64Array): void {
    const { nx, eastM3PerPaS: east, northM3PerPaS: north, sideM3PerPaS: side } = this.grid;
    const { size } = this;
    for (let cell = 0; cell < size; cell++) out[cell] = side[cell] * x[cell];
    for (let cell = 0; cell < size; cell++) {
      if (east[cell] !== 0) {
        const flux = east[cell] * (x[cell] - x[cell + 1]);
        out[cell] += flux;
        out[cell + 1] -= flux;
      }
      if (north[cell] !== 0) {
        const flux = north[cell] * (x[cell] - x[cell + nx]);
        out[cell] += flux;
        out[cell + nx] -= flux;
      }
    }
  }

  /** Gives the memory of the factors back. */
  releaseFactors(): void {
    this.factors.clear();
  }
}
