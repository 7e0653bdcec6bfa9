/** Which limits a given set of rates breaks, in words: for plans that nobody searched for. */
import type { FieldModel } from '../scenario/field-model';
import type { PlanSpec } from '../scenario/types';
import { bottomHolePressures } from '../wells/bottom-hole';
import type { CountResult } from '../seismicity/field-count';
import { breakSentence } from './limit-words';
import { capValues } from './plan-program';
import { isOut, planRows, RATE_SCALE, type ControlColumns, type PlanLimit } from './plan-limits';

/** Relative to the limit's own scale; smaller than anything a meter shows. */
const NOTICEABLE = 1e-6;

interface Break {
  limit: PlanLimit;
  amount: number;
  weeks: number[];
}

/** @param rates weekly magnitudes of every well over the plan's weeks */
export function brokenLimits(
  model: FieldModel,
  plan: PlanSpec,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
  rates: readonly Float64Array[],
  count: CountResult,
): string[] {
  const breaks = new Map<string, Break>();
  const note = (limit: PlanLimit, scaledAmount: number) => {
    if (!(scaledAmount > NOTICEABLE)) return;
    const key = `${limit.name}/${limit.well ?? limit.scope ?? ''}`;
    const amount = scaledAmount * limit.siPerUnit;
    const entry = breaks.get(key) ?? { limit, amount: 0, weeks: [] };
    if (limit.week !== undefined) entry.weeks.push(limit.week);
    entry.amount = Math.max(entry.amount, amount);
    breaks.set(key, entry);
  };

  const x = new Float64Array(columns.lower.length);
  columns.controls.forEach(({ well, index }, c) => {
    for (let week = 0; week < columns.weeks; week++) {
      const v = c * columns.weeks + week;
      x[v] = rates[index][week] / RATE_SCALE;
      const limit = (name: PlanLimit['name']): PlanLimit => ({
        name,
        well: well.spec.name,
        week: week + 1,
        siPerUnit: RATE_SCALE,
        unit: 'm3/s',
      });
      if (isOut(well, week)) note(limit('outage'), x[v]);
      else {
        note(limit('maxRate'), x[v] - columns.upper[v]);
        note(limit('minRate'), columns.lower[v] - x[v]);
      }
    }
  });
  for (const row of planRows(model, plan, columns, fixed)) {
    const value = row.indices.reduce((sum, v, entry) => sum + row.values[entry] * x[v], 0);
    note(row.limit, Math.max(row.lower - value, value - row.upper));
  }
  const pressures = bottomHolePressures(model, rates, columns.weeks);
  model.wells.forEach((well, j) => {
    const { name, minPressurePa, maxPressurePa } = well.spec;
    for (let week = 0; week < columns.weeks; week++) {
      const common = { well: name, week: week + 1, siPerUnit: 1e6, unit: 'Pa' } as const;
      const { minPa, maxPa } = pressures[j][week];
      if (maxPressurePa !== null) note({ name: 'maxPressure', ...common }, (maxPa - maxPressurePa) / 1e6);
      if (minPressurePa !== null) note({ name: 'minPressure', ...common }, (minPressurePa - minPa) / 1e6);
    }
  });
  for (const cap of plan.caps) {
    for (const { week, value, limitEvents } of capValues(model, cap, count)) {
      note({ name: 'cap', scope: cap.scope, week, siPerUnit: limitEvents, unit: 'events' }, value - 1);
    }
  }
  return [...breaks.values()].map(({ limit, amount, weeks }) => breakSentence(limit, amount, weeks));
}
