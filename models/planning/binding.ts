/**
 * The limits that hold the plan where it is, and what one unit of give in each would change.
 *
 * Source    Duals of the last bounding linear program (cutting-plane.ts): a relaxation by a small amount changes
 *           the least number of events by dual × amount.
 * Units     events (quietest: fewer, below 0) or joules (most heat: more, above 0) per m³/s, J of a week, Pa, event
 */
import type { BindingLimit } from '../scenario/types';
import type { CuttingPlaneResult } from './cutting-plane';
import type { PlanProgram } from './plan-program';
import {
  RATE_SCALE,
  type ControlColumns,
  type LimitName,
  type LimitRow,
  type PlanLimit,
} from './plan-limits';

/** Duals below this, in the program's units, are round-off. */
const NOTICEABLE = 1e-6;

export function bindingLimits(
  result: CuttingPlaneResult,
  columns: ControlColumns,
  { perUnit, unit }: Pick<PlanProgram, 'perUnit' | 'unit'>,
): BindingLimit[] {
  const sign = unit === 'events' ? -1 : 1;
  const found = new Map<string, BindingLimit>();
  const add = (limit: PlanLimit, dual: number) => {
    if (!(Math.abs(dual) > NOTICEABLE)) return;
    const key = `${limit.name}/${limit.well ?? limit.scope ?? ''}/${limit.week ?? ''}`;
    // Giving way can only help: the sign of a dual tells the side, not the worth.
    const price = (sign * Math.abs(dual) * perUnit) / limit.siPerUnit;
    const before = found.get(key);
    if (before) before.price += price;
    else {
      found.set(key, {
        limit: limit.name,
        ...(limit.well === undefined ? {} : { well: limit.well }),
        ...(limit.scope === undefined ? {} : { scope: limit.scope }),
        ...(limit.week === undefined ? {} : { week: limit.week }),
        price,
        unit: `${unit} per ${limit.unit}`,
      });
    }
  };
  columns.controls.forEach(({ well }, c) => {
    for (let week = 0; week < columns.weeks; week++) {
      const v = c * columns.weeks + week;
      const name = boundThatBinds(columns, v, result.columnDual[v]);
      if (name)
        add(
          { name, well: well.spec.name, week: week + 1, siPerUnit: RATE_SCALE, unit: 'm3/s' },
          result.columnDual[v],
        );
    }
  });
  result.rows.forEach((row, index) => add((row as LimitRow).limit, result.rowDual[index]));
  return [...found.values()].sort((a, b) => worth(b) - worth(a));
}

/** A dual below 0 wants more than the upper bound, above 0 less than the lower one; below zero there is nothing. */
function boundThatBinds({ lower, outage }: ControlColumns, v: number, dual: number): LimitName | null {
  if (dual < 0) return outage[v] ? 'outage' : 'maxRate';
  return lower[v] > 0 ? 'minRate' : null;
}

/** Worth of a natural step of each unit, to put them in one order: 10 l/s, 1 MPa, 1 TJ, one event. */
const STEP: Record<string, number> = { 'm3/s': 0.01, Pa: 1e6, J: 1e12, events: 1 };
const worth = ({ price, unit }: BindingLimit) => Math.abs(price) * STEP[unit.split(' per ')[1]];
