import type { FieldRow } from '../../../db/store/fields';
import { AppError, badRequest, conflict } from '../../errors';
import { addWeeks, dayInWords, isWeekStart, weekStartOf } from '../../time/local-week';
import type { PlanRequest } from '../../../src/contract/plans';

const FURTHEST_START_WEEKS = 26;

type Horizon = Pick<PlanRequest, 'firstWeekStartsAt' | 'weeks' | 'heatTargetJPerWeek'>;

/** What the schema cannot know: the site's calendar and the clock. Gives one target for each week. */
export function checkHorizon(field: FieldRow, request: Horizon, nowAt: number): number[] {
  const { firstWeekStartsAt, weeks, heatTargetJPerWeek } = request;
  const { timeZone } = field;
  if (!isWeekStart(firstWeekStartsAt, timeZone)) {
    const message = `Weeks of ${field.name} start on Monday at midnight, ${timeZone} time.`;
    throw badRequest('The first week is not the start of a week.', [{ path: 'firstWeekStartsAt', message }]);
  }
  if (firstWeekStartsAt <= nowAt) {
    const day = dayInWords(firstWeekStartsAt, timeZone);
    throw conflict('PLAN_WEEK_STARTED', `The week of ${day} has begun: plan from a later one.`);
  }
  const furthest = addWeeks(weekStartOf(nowAt, timeZone), FURTHEST_START_WEEKS, timeZone);
  if (firstWeekStartsAt > furthest) {
    const message = `A plan starts at most ${FURTHEST_START_WEEKS} weeks ahead.`;
    throw badRequest('The first week is too far ahead.', [{ path: 'firstWeekStartsAt', message }]);
  }
  if (heatTargetJPerWeek.length !== weeks && heatTargetJPerWeek.length !== 1) {
    const message = `${weeks} weeks need ${weeks} targets, or one for all of them; ${heatTargetJPerWeek.length} were given.`;
    throw new AppError('TARGET_COUNT', 422, message, { fields: [{ path: 'heatTargetJPerWeek', message }] });
  }
  return Array.from({ length: weeks }, (_, week) => heatTargetJPerWeek[week] ?? heatTargetJPerWeek[0]!);
}
