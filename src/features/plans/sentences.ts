/** What a plan says, in sentences of people. */
import type { PlanResult } from '../../contract/plans';
import { chance, counted, inWords, multiple, percent, significant } from '../../lib/format';

export const planWeeksOf = (result: PlanResult) => result.weeks.filter((week) => !week.lookAhead);

/** Round-off of set-points and of the planner's own tolerance. */
const SLACK = 1e-6;

export function weeksShortOfTarget(result: PlanResult): number[] {
  return planWeeksOf(result)
    .filter((week) => week.heatTargetJ !== null && week.heatJ < week.heatTargetJ * (1 - SLACK))
    .map((week) => week.week);
}

export const heatTargetJ = (result: PlanResult): number =>
  planWeeksOf(result).reduce((sum, week) => sum + (week.heatTargetJ ?? 0), 0);

export function headline(result: PlanResult): string {
  const weeks = planWeeksOf(result).length;
  const { planWeeks, comparison } = result;
  const background = planWeeks.rateMultiple > 0 ? planWeeks.expectedEvents / planWeeks.rateMultiple : 0;
  const short = weeksShortOfTarget(result);
  const energy =
    short.length === 0
      ? 'the energy target is met every week'
      : `${counted(short.length, 'week falls short of its target', 'weeks fall short of their targets')}`;
  const over = `${inWords(multiple(planWeeks.rateMultiple))} background over ${counted(weeks, 'week')}`;
  const events = `${significant(planWeeks.expectedEvents)} earthquakes expected where the background is ${significant(background)}`;
  const hold = mean(comparison.hold.weeklyRateMultiple.slice(0, weeks));
  return `${over}: ${events}, and ${energy}. Holding today’s rates would mean ${inWords(multiple(hold))}.`;
}

const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / Math.max(1, values.length);

/** Over the plan's weeks, from the chances of the single weeks. */
export function chanceSentence(result: PlanResult): string {
  const quiet = planWeeksOf(result).reduce((product, week) => product * (1 - week.chance), 1);
  return `The chance of at least one earthquake of M ≥ ${result.chanceMagnitude.toFixed(1)} in the plan’s weeks is ${chance(1 - quiet)}. Stress from heat and from the rock’s own stiffness is left out of the model.`;
}

export function gapSentence({ gap, lowerBound, totals }: PlanResult): string {
  const weeks = `over the plan and its look-ahead`;
  return `At most ${inWords(percent(gap, 2))} above the best there can be: ${weeks} it expects ${significant(totals.expectedEvents, 4)} earthquakes, and no plan within these limits can expect fewer than ${significant(lowerBound, 4)}.`;
}

export function checkSentence({ check, totals }: PlanResult): string {
  return `Run again on its own by small time steps, the same rates give ${significant(check.expectedEvents, 4)} earthquakes instead of ${significant(totals.expectedEvents, 4)}: ${inWords(percent(check.relativeDifference, 2))} apart.`;
}

export const SHADOW_SENTENCE =
  'In some weeks the forecast lies below background because rates were cut below what the ground is used to: a stress shadow. It is borrowed quiet, not a new normal; do not plan on it.';

export const MODEL_CAUTION =
  'Both are about the model, not the ground: they say that no better plan was overlooked, not that the forecast will come true.';
