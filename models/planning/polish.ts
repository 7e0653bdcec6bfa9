/**
 * Among plans almost as good as the best, the one that moves the set-points least.
 *
 *   min Σ_jk |q_jk − q_j,k−1|  subject to the limits and an objective within ε of the best
 *
 * Method    Linear program over the cuts already made; a candidate that passes the objective or a cap is cut off
 *           and the program solved again. What still passes after the last round is drawn back towards the best
 *           plan: on that line the limits hold, the objective and the caps are convex.
 * Units     the program's own (cutting-plane.ts)
 */
import { StoppedError } from '../errors';
import { cutAt, cutRow, totalAt, type ConvexValue, type Cut, type CuttingPlaneResult } from './cutting-plane';
import { LinearProgram, linearSolver, type LinearRow } from './linear-program';
import { RATE_SCALE, type ControlColumns } from './plan-limits';
import type { PlanProgram } from './plan-program';

const MOST_ROUNDS = 12;
const BISECTIONS = 12;
/** The cuts aim a little inside the tolerance, so that the last candidate seldom has to be drawn back. */
const AIM = 0.8;

export async function polish(
  program: PlanProgram,
  columns: ControlColumns,
  best: CuttingPlaneResult,
  tolerance: number,
  hooks: { onRound?: (round: number, most: number) => void; shouldStop?: () => boolean },
): Promise<Float64Array> {
  const lp = new LinearProgram(await linearSolver());
  try {
    const size = best.x.length;
    for (let v = 0; v < size; v++) lp.addColumn(0, program.lower[v], program.upper[v]);
    const partCount = best.cuts.reduce((most, cut) => Math.max(most, cut.part + 1), 0);
    const firstPart = size;
    for (let part = 0; part < partCount; part++) lp.addColumn(0, program.leastPart, Infinity);
    for (const row of best.rows) lp.addRow(row);
    const addCut = (cut: Cut) => lp.addRow(cutRow(cut, firstPart + cut.part));
    for (const cut of best.cuts) addCut(cut);
    const give = Math.abs(best.value + program.offset) * tolerance;
    lp.addRow(objectiveRow(program, firstPart, partCount, best.value + AIM * give));
    addMovement(lp, columns);

    const keeps = (x: Float64Array, value: ConvexValue) =>
      !value.breaksLimit && totalAt(program, x, value) <= best.value + give;
    let candidate = best.x;
    for (let round = 0; round < MOST_ROUNDS; round++) {
      if (hooks.shouldStop?.()) throw new StoppedError();
      hooks.onRound?.(round, MOST_ROUNDS);
      const answer = lp.solve();
      if (!answer) return best.x;
      candidate = answer.x
        .slice(0, size)
        .map((value, v) => Math.min(program.upper[v], Math.max(program.lower[v], value)));
      const broken = program.violatedRows?.(candidate) ?? [];
      for (const row of broken) lp.addRow(row);
      if (broken.length > 0) continue;
      const value = program.evaluate(candidate);
      if (keeps(candidate, value)) return candidate;
      for (const row of value.limitRows ?? []) lp.addRow(row);
      value.parts.forEach((partValue, part) =>
        addCut(cutAt(candidate, part, partValue, value.gradients[part])),
      );
    }
    return drawBack(program, best.x, candidate, keeps);
  } finally {
    lp.dispose();
  }
}

/** The farthest point from `best` towards `candidate` that keeps everything. */
function drawBack(
  program: PlanProgram,
  best: Float64Array,
  candidate: Float64Array,
  keeps: (x: Float64Array, value: ConvexValue) => boolean,
): Float64Array {
  let kept = best;
  let low = 0;
  let high = 1;
  for (let step = 0; step < BISECTIONS; step++) {
    const share = (low + high) / 2;
    const point = best.map((value, v) => value + share * (candidate[v] - value));
    if ((program.violatedRows?.(point) ?? []).length === 0 && keeps(point, program.evaluate(point))) {
      kept = point;
      low = share;
    } else high = share;
  }
  return kept;
}

/** cost·x + Σ θ ≤ most */
function objectiveRow({ cost }: PlanProgram, firstPart: number, partCount: number, most: number): LinearRow {
  const indices = Array.from({ length: partCount }, (_, part) => firstPart + part);
  const values = new Array<number>(partCount).fill(1);
  cost?.forEach((entry, v) => {
    if (entry === 0) return;
    indices.push(v);
    values.push(entry);
  });
  return { lower: -Infinity, upper: most, indices, values };
}

/** Columns m ≥ |x_k − x_k−1| with cost 1, first against the last measured rate; outages move for nothing. */
function addMovement(lp: LinearProgram, { weeks, controls, outage }: ControlColumns): void {
  controls.forEach(({ well }, c) => {
    for (let week = 0; week < weeks; week++) {
      const v = c * weeks + week;
      if (outage[v] || (week > 0 && outage[v - 1])) continue;
      const movement = lp.addColumn(1, 0, Infinity);
      const last = well.lastRateM3PerS / RATE_SCALE;
      for (const side of [1, -1]) {
        const [indices, values, least] =
          week === 0
            ? [[v, movement], [-side, 1], -side * last]
            : [[v, v - 1, movement], [-side, side, 1], 0];
        lp.addRow({ lower: least, upper: Infinity, indices, values });
      }
    }
  });
}
