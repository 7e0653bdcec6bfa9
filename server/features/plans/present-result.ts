import type {
  Alternative,
  PlanResult as ModelResult,
  Scenario,
  WellSpec,
} from '../../../models/scenario/types';
import type { PlanResult } from '../../../src/contract/plans';
import { planWeekTotals } from '../../jobs/plan-week-totals';
import { bindingSentence } from './binding-sentence';
import { weeklyStates } from './weekly-state';

/** Felt by some people at the surface where the source is shallow; permits often name a magnitude near it. */
const CHANCE_MAGNITUDE = 2.0;
/** A forecast this far below background is a stress shadow and not round-off. */
const SHADOW_BELOW = 0.995;

/** The model's answer as people read it. `startsAt` gives the start of a week counted from 1. */
export function presentResult(
  scenario: Scenario,
  result: ModelResult,
  inputHash: string,
  startsAt: (week: number) => number,
): PlanResult {
  const plan = scenario.plan!;
  const { completenessMagnitude, bValue } = scenario.seismicity;
  const share = 10 ** (-bValue * (CHANCE_MAGNITUDE - completenessMagnitude));
  return {
    wells: scenario.wells.map((well) => presentWell(scenario, result, well)),
    weeks: result.weeks.map((week) => {
      const lookAhead = week.week > plan.weeks;
      return {
        ...week,
        lookAhead,
        startsAt: startsAt(week.week),
        heatTargetJ: lookAhead ? null : weekly(plan.heatTargetJPerWeek, week.week),
        heatCeilingJ: lookAhead ? null : weekly(plan.heatCeilingJPerWeek, week.week),
        // expm1 keeps small chances exact.
        chance: -Math.expm1(-week.expectedEvents * share),
      };
    }),
    totals: result.totals,
    planWeeks: planWeekTotals(result, plan.weeks),
    // The application asks for the quietest plan, which always has one.
    lowerBound: result.lowerBound!,
    gap: result.gap,
    binding: result.binding.map((limit) => ({ ...limit, sentence: bindingSentence(limit) })),
    comparison: {
      hold: presentAlternative(result.comparison.hold),
      evenSplit: result.comparison.evenSplit ? presentAlternative(result.comparison.evenSplit) : null,
    },
    check: result.check,
    stressShadow: result.weeks.some((week) => week.rateMultiple < SHADOW_BELOW),
    chanceMagnitude: CHANCE_MAGNITUDE,
    rounds: result.rounds,
    seconds: result.seconds,
    modelVersion: result.modelVersion,
    inputHash,
  };
}

/** One entry holds for all weeks, none means there is no such limit. */
const weekly = (values: number[], week: number) => values[week - 1] ?? values[0] ?? null;

function presentWell(scenario: Scenario, result: ModelResult, well: WellSpec): PlanResult['wells'][number] {
  const history = scenario.history.find((entry) => entry.well === well.name);
  const lastRateM3PerS = history?.steps.at(-1)?.rateM3PerS ?? 0;
  const rates = result.rates.find((entry) => entry.well === well.name);
  if (!rates) throw new Error(`the result has no rates for ${well.name}`);
  const { name, kind, control, minRateM3PerS, maxRateM3PerS, maxChangeM3PerSPerWeek } = well;
  return {
    name,
    kind,
    control,
    minRateM3PerS,
    maxRateM3PerS,
    maxChangeM3PerSPerWeek,
    minPressurePa: well.minPressurePa,
    maxPressurePa: well.maxPressurePa,
    lastRateM3PerS,
    weeklyM3PerS: rates.weeklyM3PerS,
    weeklyState: weeklyStates(well, scenario.plan!, lastRateM3PerS, rates.weeklyM3PerS),
  };
}

function presentAlternative(alternative: Alternative): PlanResult['comparison']['hold'] {
  const { expectedEvents, rateMultiple, meetsTargets, breaks, weeklyRateMultiple, weeklyHeatJ } = alternative;
  return { expectedEvents, rateMultiple, meetsTargets, breaks, weeklyRateMultiple, weeklyHeatJ };
}
