/**
 * Minimises a sum of convex parts over linear limits, with a certified lower bound.
 *
 *   min cost·x + Σ_g f_g(x)  subject to  lower ≤ x ≤ upper, rows, h_c(x) ≤ 1
 *   f_g(x) ≥ f_g(x_i) + ∇f_g(x_i)·(x − x_i) at every visited x_i, so the linear program over all of these is
 *   never above the minimum: lower bound; the best visited feasible point: upper bound.
 *
 * Method    Kelley's cuts, one row per part and visit (several parts make a tighter model than their sum), with
 *           a box round the best point that widens when the model predicts well and shrinks when it does not.
 *           Rows that are many and rarely active come from `violatedRows` when a point breaks them; a convex limit
 *           h_c ≤ 1 comes as rows too, its linearisations where it was visited: all of them together hold more than
 *           the true limit allows, so the bound stays one.
 * Source    Kelley (1960), J. SIAM 8(4), 703–712; trust box: Linderoth & Wright (2003), Comput. Optim. Appl. 24,
 *           207–250.
 * Units     x and f scaled to about 1 by the caller
 * Limits    a value below an earlier cut or a bound above the best value (wrong gradient, a part that is not convex)
 *           throws NumericalError
 */
import { NumericalError, StoppedError } from '../errors';
import { LinearProgram, linearSolver, type LinearAnswer, type LinearRow } from './linear-program';

export interface ConvexValue {
  parts: number[];
  gradients: Float64Array[];
  /** Where there are convex limits: the linearisations at x of those that x breaks or nearly breaks. */
  limitRows?: LinearRow[];
  /** Whether x breaks a convex limit. */
  breaksLimit?: boolean;
}

export interface ConvexProgram {
  lower: Float64Array;
  upper: Float64Array;
  rows: LinearRow[];
  /** Linear part of the objective; absent: none. */
  cost?: Float64Array;
  /** Value and gradient of each part at x. */
  evaluate: (x: Float64Array) => ConvexValue;
  /** Rows that x breaks among those not given in `rows`; empty when it keeps them all. */
  violatedRows?: (x: Float64Array) => LinearRow[];
  /** Points worth a first cut; they need not keep the limits. */
  startPoints: Float64Array[];
  /** No part falls below this. */
  leastPart: number;
}

export interface CuttingPlaneOptions {
  /** The search ends when value and bound differ by this share of the value. */
  relativeGap: number;
  /** Values below this count as this much: nothing is gained by certifying a share of nothing. */
  smallestValue?: number;
  mostRounds: number;
  onRound?: (round: number, relativeGap: number) => void;
  shouldStop?: () => boolean;
}

export interface CuttingPlaneResult {
  x: Float64Array;
  value: number;
  lowerBound: number;
  rounds: number;
  /** Duals of the last bounding program: columns of x, and rows in the order of `rows`. */
  columnDual: Float64Array;
  rowDual: Float64Array;
  /** `program.rows` and after them the rows that were added on the way. */
  rows: LinearRow[];
  /** Every cut made, for programs that go on from here. */
  cuts: Cut[];
}

export interface Cut {
  part: number;
  /** part ≥ constant + gradient·x */
  constant: number;
  gradient: Float64Array;
}

/** No point keeps all rows; carries the rows known by then. */
export class InfeasibleError extends Error {
  constructor(readonly rows: LinearRow[]) {
    super('no point keeps every limit');
    this.name = 'InfeasibleError';
  }
}

/** Simplex works to 1e-9; this much of the bound is given away so that it stays one. */
const BOUND_SAFETY = 1e-7;
const MOST_ROW_PASSES = 50;
/** Round-off of a part and its cut, relative. */
const CONVEXITY_TOLERANCE = 1e-7;
/**
 * Candidates keep their linearised limits by a margin, so that the true ones are kept as well: wide until there is a
 * plan in hand, then a share of its gap.
 */
const MARGIN = { widest: 2e-3, narrowest: 2e-5, shareOfGap: 0.3 };

export async function minimiseConvex(
  program: ConvexProgram,
  options: CuttingPlaneOptions,
): Promise<CuttingPlaneResult> {
  const lp = new LinearProgram(await linearSolver());
  try {
    return await search(lp, program, options);
  } finally {
    lp.dispose();
  }
}

async function search(
  lp: LinearProgram,
  program: ConvexProgram,
  options: CuttingPlaneOptions,
): Promise<CuttingPlaneResult> {
  const { lower, upper } = program;
  const size = lower.length;
  for (let v = 0; v < size; v++) lp.addColumn(program.cost?.[v] ?? 0, lower[v], upper[v]);
  const rows = [...program.rows];
  const rowAt = rows.map((row) => lp.addRow(row));
  const limitAt: number[] = []; // where the linearised limits stand in the program
  const cuts: Cut[] = [];
  let firstPart = -1;

  const addCuts = (x: Float64Array, value: ConvexValue) => {
    if (firstPart < 0) {
      firstPart = lp.columns;
      for (let part = 0; part < value.parts.length; part++) lp.addColumn(1, program.leastPart, Infinity);
    }
    for (const cut of cuts) checkAgainst(cut, x, value);
    value.parts.forEach((partValue, part) => {
      const cut = cutAt(x, part, partValue, value.gradients[part]);
      cuts.push(cut);
      lp.addRow(cutRow(cut, firstPart + part));
    });
    for (const row of value.limitRows ?? []) {
      rows.push(row);
      rowAt.push(lp.addRow(row));
      limitAt.push(rowAt[rowAt.length - 1]);
    }
  };
  const tightenLimits = (margin: number) => {
    for (const row of limitAt) lp.setRowUpper(row, lp.rows[row].upper - margin);
  };
  /** `undecided`: what to answer where the solver cannot tell; without it that is an error. */
  const tryWithRows = (undecided?: null): LinearAnswer | null => {
    for (let pass = 0; pass < MOST_ROW_PASSES; pass++) {
      if (options.shouldStop?.()) throw new StoppedError();
      const answer = undecided === null ? lp.solveOrGiveUp() : lp.solve();
      if (!answer) return null;
      const broken = program.violatedRows?.(clip(answer.x)) ?? [];
      if (broken.length === 0) return answer;
      for (const row of broken) {
        rows.push(row);
        rowAt.push(lp.addRow(row));
      }
    }
    throw new NumericalError('limits inside the weeks could not be kept by adding them one by one');
  };
  const solveWithRows = (): LinearAnswer => {
    const answer = tryWithRows();
    if (!answer) throw new InfeasibleError(rows);
    return answer;
  };
  /** Inside the box and the tightened limits; a box or a margin that leaves nothing is given up. */
  const solveForCandidate = (fallback: LinearAnswer): LinearAnswer => {
    if (limitAt.length === 0) return best ? solveWithRows() : fallback;
    const { widest, narrowest, shareOfGap } = MARGIN;
    tightenLimits(best ? Math.min(widest, Math.max(narrowest, shareOfGap * gap)) : widest);
    const answer = tryWithRows(null);
    tightenLimits(0);
    return answer ?? tryWithRows(null) ?? fallback;
  };
  const clip = (x: Float64Array) =>
    Float64Array.from({ length: size }, (_, v) => Math.min(upper[v], Math.max(lower[v], x[v])));
  const box = (centre: Float64Array | null, share: number) => {
    for (let v = 0; v < size; v++) {
      const reach = share * (upper[v] - lower[v]);
      const low = centre ? Math.max(lower[v], centre[v] - reach) : lower[v];
      const high = centre ? Math.min(upper[v], centre[v] + reach) : upper[v];
      lp.setColumnBounds(v, low, high);
    }
  };

  let best: Float64Array | null = null;
  solveWithRows(); // whether there is any plan at all, before anything expensive
  for (const start of program.startPoints) addCuts(start, program.evaluate(start));

  let bestValue = Infinity;
  let lowerBound = -Infinity;
  let share = 0.25;
  let bound: LinearAnswer | null = null;
  let gap = Infinity;
  let round = 0;
  for (; round < options.mostRounds; round++) {
    if (options.shouldStop?.()) throw new StoppedError();
    box(null, 1);
    bound = solveWithRows();
    lowerBound = Math.max(lowerBound, bound.objective - BOUND_SAFETY * Math.abs(bound.objective));
    if (best) {
      gap = (bestValue - lowerBound) / Math.max(Math.abs(bestValue), options.smallestValue ?? 0);
      options.onRound?.(round, gap);
      if (gap < -1e-6)
        throw new NumericalError('the lower bound lies above a plan in hand', { bestValue, lowerBound });
      if (gap <= options.relativeGap) break;
    }
    if (best) box(best, share);
    const candidate = solveForCandidate(bound);
    const x = clip(candidate.x);
    const value = program.evaluate(x);
    const total = totalAt(program, x, value);
    addCuts(x, value);
    if (best && !value.breaksLimit) {
      const predicted = bestValue - candidate.objective;
      const gained = bestValue - total;
      if (gained > 0.5 * predicted) share = Math.min(1, 2 * share);
      else if (gained < 0.1 * predicted) share /= 2;
    }
    if (!value.breaksLimit && total < bestValue) {
      bestValue = total;
      best = x;
    }
  }
  if (!best || !bound) throw new NumericalError('the plan search ended without a plan', { rounds: round });
  return {
    x: best,
    value: bestValue,
    lowerBound: Math.min(lowerBound, bestValue),
    rounds: round,
    columnDual: bound.columnDual.slice(0, size),
    rowDual: Float64Array.from(rowAt, (row) => bound.rowDual[row] ?? 0),
    rows,
    cuts,
  };
}

/** The whole objective. */
export function totalAt({ cost }: ConvexProgram, x: Float64Array, { parts }: ConvexValue): number {
  let total = 0;
  for (const part of parts) total += part;
  if (cost) for (let v = 0; v < x.length; v++) total += cost[v] * x[v];
  return total;
}

/** A value below a cut made elsewhere: the part is not convex or its gradient is wrong, and no bound holds. */
function checkAgainst({ part, constant, gradient }: Cut, x: Float64Array, value: ConvexValue): void {
  let least = constant;
  for (let v = 0; v < x.length; v++) least += gradient[v] * x[v];
  if (value.parts[part] < least - CONVEXITY_TOLERANCE * (1 + Math.abs(least))) {
    throw new NumericalError('a part lies below its own linearisation', {
      part,
      value: value.parts[part],
      least,
    });
  }
}

export function cutAt(x: Float64Array, part: number, value: number, gradient: Float64Array): Cut {
  let constant = value;
  for (let v = 0; v < x.length; v++) constant -= gradient[v] * x[v];
  return { part, constant, gradient };
}

/** gradient·x − θ ≤ −constant */
export function cutRow(cut: Cut, partColumn: number): LinearRow {
  const indices: number[] = [];
  const values: number[] = [];
  cut.gradient.forEach((entry, v) => {
    if (Math.abs(entry) < 1e-12) return;
    indices.push(v);
    values.push(entry);
  });
  indices.push(partColumn);
  values.push(-1);
  return { lower: -Infinity, upper: -cut.constant, indices, values };
}
