import type { FieldRow } from '../../../db/store/fields';
import { recentDurationsS } from '../../../db/store/jobs';
import { listHeatTargets } from '../../../db/store/readings';
import { SECONDS_PER_WEEK } from '../../../models/constants';
import type { PlanRequest } from '../../../src/contract/plans';
import type { Context } from '../../context';
import { addWeeks, dayInWords } from '../../time/local-week';
import { currentWeekStart, lastRates, wellsOf } from '../fields/service';

const DEFAULT_WEEKS = 12;
/** Seismicity answers over months: a plan blind to what comes after it pushes trouble past its end. */
const DEFAULT_LOOK_AHEAD_WEEKS = 26;
const DEFAULT_HEAT_BAND = 0.02;
const RUNS_REMEMBERED = 5;

export function planDefaults(context: Context, field: FieldRow) {
  const firstWeekStartsAt = addWeeks(currentWeekStart(context, field), 1, field.timeZone);
  const lastWeekHeatJ = heatOfLastRates(context, field.id);
  const request: PlanRequest = {
    name: `Plan from ${dayInWords(firstWeekStartsAt, field.timeZone)}`,
    firstWeekStartsAt,
    weeks: DEFAULT_WEEKS,
    lookAheadWeeks: DEFAULT_LOOK_AHEAD_WEEKS,
    objective: 'quietest',
    heatTargetJPerWeek: targetsFrom(context, field, firstWeekStartsAt, lastWeekHeatJ),
    heatBand: DEFAULT_HEAT_BAND,
    notes: '',
  };
  return { request, lastWeekHeatJ, typicalSeconds: typicalSeconds(context, field.id) };
}

export function heatOfLastRates(context: Context, fieldId: string): number {
  const rates = lastRates(context, fieldId);
  return wellsOf(context, fieldId).reduce(
    (sum, well) => sum + (rates.get(well.id)?.rateM3PerS ?? 0) * (well.heatJPerM3 ?? 0) * SECONDS_PER_WEEK,
    0,
  );
}

/** The calendar's targets; a week that has none takes the one before, the first what was delivered last. */
function targetsFrom(context: Context, field: FieldRow, fromAt: number, lastWeekHeatJ: number): number[] {
  const beforeAt = addWeeks(fromAt, DEFAULT_WEEKS, field.timeZone);
  const calendar = new Map(
    listHeatTargets(context.database.db, field.id, fromAt, beforeAt).map((row) => [
      row.weekStartsAt,
      row.heatJ,
    ]),
  );
  // One joule stands in where nothing was ever delivered: a target has to be positive.
  let target = Math.max(lastWeekHeatJ, 1);
  return Array.from({ length: DEFAULT_WEEKS }, (_, week) => {
    target = calendar.get(addWeeks(fromAt, week, field.timeZone)) ?? target;
    return target;
  });
}

function typicalSeconds(context: Context, fieldId: string): number | null {
  const runs = recentDurationsS(context.database.db, fieldId, 'plan.build', RUNS_REMEMBERED);
  return runs.sort((a, b) => a - b)[Math.floor(runs.length / 2)] ?? null;
}
