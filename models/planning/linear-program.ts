/**
 * A linear (or mixed-integer) program kept in the solver between solves, with every answer checked before use.
 *
 * Method    HiGHS (dual simplex with warm starts; branch and cut where columns are whole numbers).
 * Source    Huangfu & Hall (2018), Math. Prog. Comp. 10, 119–142.
 * Limits    an answer that misses a row or bound by more than the tolerance throws NumericalError
 */
import loadHighs, { type Highs, type Model } from 'highs';

import { NumericalError } from '../errors';

export interface LinearRow {
  lower: number;
  upper: number;
  indices: number[];
  values: number[];
}

export interface LinearAnswer {
  objective: number;
  x: Float64Array;
  /** Change of the objective per unit of a column's active bound. */
  columnDual: Float64Array;
  /** Change of the objective per unit of a row's active side. */
  rowDual: Float64Array;
}

/** Largest accepted violation of a row or bound, in the program's own (scaled) units. */
export const FEASIBILITY = 1e-7;

let solver: Promise<Highs> | null = null;
export function linearSolver(): Promise<Highs> {
  solver ??= loadHighs({ print: () => {}, printErr: () => {} });
  return solver;
}

export class LinearProgram {
  private readonly model: Model;
  private readonly lower: number[] = [];
  private readonly upper: number[] = [];
  readonly rows: LinearRow[] = [];
  private hasIntegers = false;

  constructor(private readonly highs: Highs) {
    this.model = highs.createModel();
    this.model.options.set({
      output_flag: false,
      primal_feasibility_tolerance: 1e-9,
      dual_feasibility_tolerance: 1e-9,
      random_seed: 0,
      small_matrix_value: 1e-12,
    });
  }

  get columns(): number {
    return this.lower.length;
  }

  addColumn(cost: number, lower: number, upper: number): number {
    this.model.addCol(cost, this.bound(lower), this.bound(upper), { indices: [], values: [] });
    this.lower.push(lower);
    this.upper.push(upper);
    return this.lower.length - 1;
  }

  addRow(row: LinearRow): number {
    this.model.addRow(this.bound(row.lower), this.bound(row.upper), {
      indices: row.indices,
      values: row.values,
    });
    this.rows.push(row);
    return this.rows.length - 1;
  }

  setColumnBounds(column: number, lower: number, upper: number): void {
    this.model.changeColBounds(column, this.bound(lower), this.bound(upper));
    this.lower[column] = lower;
    this.upper[column] = upper;
  }

  /** For one solve after the other: `rows` keeps the side that the row was added with. */
  setRowUpper(row: number, upper: number): void {
    this.model.changeRowBounds(row, this.bound(this.rows[row].lower), this.bound(upper));
  }

  setInteger(column: number): void {
    this.model.changeColIntegrality(column, this.highs.constants.variableType.integer);
    this.hasIntegers = true;
  }

  /** Bounds the search by nodes, not by seconds: the same input must give the same answer. */
  limitSearch(relativeGap: number, mostNodes: number): void {
    this.model.options.set({ mip_rel_gap: relativeGap, mip_max_nodes: mostNodes });
  }

  /** The checked answer, or null where no point keeps every row. */
  solve(): LinearAnswer | null {
    const { modelStatus } = this.highs.constants;
    let status = this.runOnce();
    if (status !== modelStatus.optimal && !this.hasIntegers) {
      // A warm start can end undecided on nearly parallel rows: once more from scratch before it is believed.
      this.model.clearSolver();
      status = this.runOnce();
    }
    if (this.isUndecided(status) && !this.hasIntegers) {
      // What presolve makes of a feasible set that is thin as a blade can be worse than the thing itself.
      this.model.options.set({ presolve: 'off' });
      this.model.clearSolver();
      status = this.runOnce();
      this.model.options.set({ presolve: 'choose' });
    }
    if (status !== modelStatus.optimal && !this.isUndecided(status)) return null;
    const solution = this.model.getSolution();
    const stoppedEarly =
      this.hasIntegers &&
      solution.colValue.length === this.columns &&
      this.worstViolation(solution.colValue) <= FEASIBILITY;
    if (status !== modelStatus.optimal && !stoppedEarly) {
      if (this.hasIntegers) return null;
      throw new NumericalError('the linear program could not be solved', { status });
    }
    const violation = this.worstViolation(solution.colValue);
    if (!(violation <= FEASIBILITY))
      throw new NumericalError('the linear program returned a point outside its limits', { violation });
    return {
      objective: this.model.getObjectiveValue(),
      x: solution.colValue,
      columnDual: solution.colDual,
      rowDual: solution.rowDual,
    };
  }

  /** The checked answer, or null where there is none or the solver cannot tell. */
  solveOrGiveUp(): LinearAnswer | null {
    try {
      return this.solve();
    } catch (error) {
      if (error instanceof NumericalError) return null;
      throw error;
    }
  }

  /** Rows and columns of an irreducible set that collides; only after `solve` returned null. */
  collidingSet(): { rows: number[]; columns: number[] } {
    const iis = this.model.getIis();
    return { rows: [...iis.rowIndex], columns: [...iis.colIndex] };
  }

  dispose(): void {
    this.model.dispose();
  }

  /** Neither solved nor shown to be impossible. */
  private isUndecided(status: number): boolean {
    const { optimal, infeasible, unboundedOrInfeasible } = this.highs.constants.modelStatus;
    return status !== optimal && status !== infeasible && status !== unboundedOrInfeasible;
  }

  private runOnce(): number {
    this.model.run();
    return this.model.getModelStatus();
  }

  private worstViolation(x: Float64Array): number {
    let worst = 0;
    for (let column = 0; column < this.columns; column++) {
      worst = Math.max(worst, this.lower[column] - x[column], x[column] - this.upper[column]);
    }
    for (const row of this.rows) {
      let value = 0;
      let size = 1;
      for (let entry = 0; entry < row.indices.length; entry++) {
        value += row.values[entry] * x[row.indices[entry]];
        size = Math.max(size, Math.abs(row.values[entry]));
      }
      worst = Math.max(worst, (row.lower - value) / size, (value - row.upper) / size);
    }
    return worst;
  }

  private bound(value: number): number {
    return value === Infinity ? this.highs.infinity : value === -Infinity ? -this.highs.infinity : value;
  }
}
