import type { PlanResult } from '../../models/scenario/types';

/** Sums over the plan's own weeks; the model's totals include the look-ahead. */
export function planWeekTotals(result: PlanResult, weeks: number) {
  const own = result.weeks.slice(0, weeks);
  const expectedEvents = own.reduce((sum, week) => sum + week.expectedEvents, 0);
  const heatJ = own.reduce((sum, week) => sum + week.heatJ, 0);
  const backgroundEvents = (result.totals.backgroundEvents * own.length) / result.weeks.length;
  return { expectedEvents, heatJ, rateMultiple: expectedEvents / backgroundEvents };
}
