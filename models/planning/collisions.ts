/**
 * Why no plan exists: the limits that collide and the least they would have to give way.
 *
 *   min Σ weight·give  subject to every limit relaxed by its own give ≥ 0
 *
 * Method    Elastic program for the amounts, the solver's irreducible set for the limits that take part without
 *           having to move. Amounts are weighed by their natural size (a target by the target, a rate by
 *           10 l/s, a pressure by 1 MPa), and what cannot give way in the field (an outage, the balance) costs most.
 * Source    Chinneck (2008), Feasibility and Infeasibility in Optimization, Springer, ch. 6.
 */
import type { CollidingLimit } from '../errors';
import { NoPlanError } from '../errors';
import { LinearProgram, linearSolver, type LinearAnswer } from './linear-program';
import { collisionSentence } from './limit-words';
import {
  RATE_SCALE,
  type ControlColumns,
  type LimitName,
  type LimitRow,
  type PlanLimit,
} from './plan-limits';

/** Cost of a scaled unit of give. */
const WEIGHT: Record<LimitName, number> = {
  heatTarget: 10,
  heatCeiling: 10,
  ramp: 10,
  maxRate: 20,
  minRate: 20,
  maxPressure: 20,
  minPressure: 20,
  outage: 200,
  massBalance: 200,
  cap: 10,
};
const NOTICEABLE = 1e-6;

/**
 * @param rows limits as rows, those of pressures found so far included
 * @param moreRows pressure limits that a relaxed plan breaks
 */
export async function explainCollision(
  columns: ControlColumns,
  rows: readonly LimitRow[],
  moreRows: (x: Float64Array) => LimitRow[],
): Promise<NoPlanError> {
  const highs = await linearSolver();
  const elastic = new LinearProgram(highs);
  const strict = new LinearProgram(highs);
  try {
    const gives: { limit: PlanLimit; column: number }[] = [];
    const give = (limit: PlanLimit) => {
      const column = elastic.addColumn(WEIGHT[limit.name], 0, Infinity);
      gives.push({ limit, column });
      return column;
    };
    const size = columns.lower.length;
    for (let v = 0; v < size; v++) elastic.addColumn(0, 0, Infinity);
    const addElastic = (row: LimitRow) => {
      const sides: number[] = [];
      const values: number[] = [];
      if (row.lower > -Infinity) {
        sides.push(give(row.limit));
        values.push(1);
      }
      if (row.upper < Infinity) {
        sides.push(give(row.limit));
        values.push(-1);
      }
      elastic.addRow({ ...row, indices: [...row.indices, ...sides], values: [...row.values, ...values] });
    };
    const boundRows = boundsAsRows(columns);
    for (const row of boundRows) addElastic(row);
    const known = [...rows];
    for (const row of known) addElastic(row);
    let answer: LinearAnswer | null = null;
    for (let pass = 0; pass < 20; pass++) {
      answer = elastic.solve();
      if (!answer) break;
      const broken = moreRows(answer.x.slice(0, size)).filter(
        (row) => !isRelaxed(row, gives, answer as LinearAnswer),
      );
      if (broken.length === 0) break;
      for (const row of broken) {
        known.push(row);
        addElastic(row);
      }
    }

    const amounts = new Map<string, CollidingLimit>();
    const add = (limit: PlanLimit, amount: number) => {
      const key = `${limit.name}/${limit.well ?? limit.scope ?? ''}/${limit.week ?? ''}`;
      const before = amounts.get(key);
      if (before && before.amount >= amount) return;
      amounts.set(key, {
        limit: limit.name,
        ...(limit.well === undefined ? {} : { well: limit.well }),
        ...(limit.scope === undefined ? {} : { scope: limit.scope }),
        ...(limit.week === undefined ? {} : { week: limit.week }),
        amount,
        unit: limit.unit,
        sentence: collisionSentence(limit, amount),
      });
    };
    for (const { limit, column } of gives) {
      const amount = answer?.x[column] ?? 0;
      if (amount > NOTICEABLE) add(limit, amount * limit.siPerUnit);
    }
    for (let v = 0; v < size; v++) strict.addColumn(0, 0, Infinity);
    const all = [...boundRows, ...known];
    for (const row of all) strict.addRow(row);
    if (!strict.solve()) for (const row of strict.collidingSet().rows) if (all[row]) add(all[row].limit, 0);
    return new NoPlanError(
      [...amounts.values()].sort((a, b) => (b.amount > 0 ? 1 : 0) - (a.amount > 0 ? 1 : 0)),
    );
  } finally {
    elastic.dispose();
    strict.dispose();
  }
}

/** A pressure that the relaxed plan passes by the amount its limit already gives way is known. */
function isRelaxed(
  row: LimitRow,
  gives: { limit: PlanLimit; column: number }[],
  answer: LinearAnswer,
): boolean {
  return gives.some(
    ({ limit, column }) =>
      limit.name === row.limit.name &&
      limit.well === row.limit.well &&
      limit.week === row.limit.week &&
      answer.x[column] > NOTICEABLE,
  );
}

function boundsAsRows({ weeks, controls, lower, upper, outage }: ControlColumns): LimitRow[] {
  const rows: LimitRow[] = [];
  controls.forEach(({ well }, c) => {
    for (let week = 0; week < weeks; week++) {
      const v = c * weeks + week;
      const limit = (name: LimitName): PlanLimit => ({
        name,
        well: well.spec.name,
        week: week + 1,
        siPerUnit: RATE_SCALE,
        unit: 'm3/s',
      });
      const common = { indices: [v], values: [1] };
      if (outage[v]) rows.push({ ...common, lower: -Infinity, upper: 0, limit: limit('outage') });
      else {
        rows.push({ ...common, lower: -Infinity, upper: upper[v], limit: limit('maxRate') });
        if (lower[v] > 0) rows.push({ ...common, lower: lower[v], upper: Infinity, limit: limit('minRate') });
      }
    }
  });
  return rows;
}
