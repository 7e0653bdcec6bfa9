/**
 * The same weekly heat and balance shared evenly: what a planner without a forecast would set.
 *
 *   Σ_producers heat_j·clip(λ, min_j, max_j) = heat of the week,   Σ_injectors clip(ν, min_j, max_j) = injection
 *
 * Method    One common rate per kind and week, cut to each well's bounds; found by bisection, since both sums
 *           rise with it. Ramps and pressures are not looked at (they are said, not kept).
 * Units     rates m³/s, magnitudes
 * Limits    null where bounds leave no even split
 */
import { SECONDS_PER_WEEK } from '../constants';
import { weeklyHeatJ } from '../scenario/forecast-scenario';
import type { FieldModel } from '../scenario/field-model';
import type { PlanSpec } from '../scenario/types';
import { isOut, RATE_SCALE, type ControlColumns } from './plan-limits';

const BISECTIONS = 100;
/** What is left over, relative to the sum that is split. */
const TOLERANCE = 1e-9;

/** @param like rates of every well whose weekly heat is to be delivered as well */
export function evenSplit(
  model: FieldModel,
  plan: PlanSpec,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
  like: readonly Float64Array[],
): Float64Array[] | null {
  const rates = fixed.map((row) => row.slice(0, columns.weeks));
  for (let week = 0; week < columns.weeks; week++) {
    const members = columns.controls.map(({ well, index }, c) => ({
      index,
      sign: well.sign,
      heat: well.spec.heatJPerM3,
      lower: columns.lower[c * columns.weeks + week] * RATE_SCALE,
      upper: columns.upper[c * columns.weeks + week] * RATE_SCALE,
      out: isOut(well, week),
    }));
    const share = (sign: 1 | -1, weight: (member: (typeof members)[number]) => number, wanted: number) => {
      const own = members.filter((member) => member.sign === sign && !member.out);
      const level = commonLevel(
        own.map((member) => ({ ...member, weight: weight(member) })),
        wanted,
      );
      if (level === null) return false;
      for (const member of members)
        if (member.sign === sign) rates[member.index][week] = member.out ? 0 : clip(level, member);
      return true;
    };
    const sumOf = (sign: 1 | -1) =>
      model.wells.reduce(
        (sum, well, j) => (well.sign === sign && !well.spec.control ? sum + fixed[j][week] : sum),
        0,
      );
    const fixedHeat = model.wells.reduce(
      (sum, well, j) =>
        well.sign < 0 && !well.spec.control ? sum + fixed[j][week] * well.spec.heatJPerM3 : sum,
      0,
    );
    const heat = weeklyHeatJ(model, like, week) / SECONDS_PER_WEEK - fixedHeat;
    const hasHeat = members.some((member) => member.sign < 0 && member.heat > 0);
    if (!share(-1, (member) => (hasHeat ? member.heat : 1), hasHeat ? heat : totalOf(model, like, week)))
      return null;
    const produced = model.wells.reduce((sum, well, j) => (well.sign < 0 ? sum + rates[j][week] : sum), 0);
    if (!share(1, () => 1, (1 - plan.lossFraction) * produced - sumOf(1))) return null;
  }
  return rates;
}

function totalOf(model: FieldModel, rates: readonly Float64Array[], week: number): number {
  return model.wells.reduce(
    (sum, well, j) => (well.sign < 0 && well.spec.control ? sum + rates[j][week] : sum),
    0,
  );
}

interface Bounds {
  lower: number;
  upper: number;
}

const clip = (level: number, { lower, upper }: Bounds) => Math.min(upper, Math.max(lower, level));

function commonLevel(members: (Bounds & { weight: number })[], wanted: number): number | null {
  const sum = (level: number) =>
    members.reduce((total, member) => total + member.weight * clip(level, member), 0);
  let low = 0;
  let high = members.reduce((most, member) => Math.max(most, member.upper), 0);
  const slack = TOLERANCE * Math.max(1e-12, Math.abs(wanted));
  if (sum(low) > wanted + slack || sum(high) < wanted - slack) return null;
  for (let step = 0; step < BISECTIONS; step++) {
    const middle = (low + high) / 2;
    if (sum(middle) < wanted) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
