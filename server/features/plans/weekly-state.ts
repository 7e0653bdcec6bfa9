import type { PlanSpec, WellSpec } from '../../../models/scenario/types';
import type { PlanResult } from '../../../src/contract/plans';

type WeeklyState = PlanResult['wells'][number]['weeklyState'][number];

/** Relative to the rate; below this two rates are the same. */
const SAME = 1e-6;

const isOut = (well: WellSpec, week: number) =>
  well.outages.some((outage) => outage.fromWeek <= week && week <= outage.toWeek);

/** What holds each week's rate where it is. */
export function weeklyStates(
  well: WellSpec,
  plan: PlanSpec,
  lastRateM3PerS: number,
  weeklyM3PerS: number[],
): WeeklyState[] {
  // A limit that lies between two set-points holds the rate at the one inside.
  const slack = (plan.setPointStepM3PerS ?? 0) / 2;
  return weeklyM3PerS.map((rate, index) => {
    const week = index + 1;
    if (isOut(well, week)) return 'outage';
    if (!well.control) return 'fixed';
    const near = (limit: number) =>
      Math.abs(rate - limit) <= Math.max(slack * (1 - SAME), SAME * Math.abs(limit));
    if (near(well.minRateM3PerS)) return 'atMin';
    if (well.maxRateM3PerS !== null && near(well.maxRateM3PerS)) return 'atMax';
    if (well.maxChangeM3PerSPerWeek === null) return 'free';
    // Steps into and out of an outage are free.
    if (week > 1 && isOut(well, week - 1)) return 'free';
    const before = index === 0 ? lastRateM3PerS : weeklyM3PerS[index - 1]!;
    const room = well.maxChangeM3PerSPerWeek;
    return near(before + room) || near(before - room) ? 'atRamp' : 'free';
  });
}
