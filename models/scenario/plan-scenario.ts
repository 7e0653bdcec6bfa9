/**
 * The plan of a scenario: searched, certified, polished, rounded, checked by another route, compared.
 *
 * Method    plan-program.ts and cutting-plane.ts (search and bound) → polish.ts → set-point-rounding.ts → independent-check.ts
 * Limits    NoPlanError where limits collide · NumericalError where the check differs by more than CHECK_LIMIT ·
 *           StoppedError on request. Pressures are kept in the plan's weeks; in the look-ahead they are reported.
 */
import { NumericalError, ScenarioError } from '../errors';
import { bindingLimits } from '../planning/binding';
import { brokenLimits } from '../planning/broken-limits';
import { explainCollision } from '../planning/collisions';
import { InfeasibleError, minimiseConvex, type CuttingPlaneResult } from '../planning/cutting-plane';
import { evenSplit } from '../planning/even-split';
import { inWeeks } from '../planning/limit-words';
import {
  brokenPressureRows,
  controlColumns,
  isOut,
  planRows,
  RATE_SCALE,
  ratesOf,
  weekly,
  type ControlColumns,
  type LimitRow,
} from '../planning/plan-limits';
import { polish } from '../planning/polish';
import { planProgram, type PlanProgram } from '../planning/plan-program';
import { roundToSetPoints } from '../planning/set-point-rounding';
import { buildFieldModel, type FieldModel, type Hooks } from './field-model';
import { describeForecast, weeklyHeatJ, weeksToForecast } from './forecast-scenario';
import { CHECK_LIMIT, checkByTimeStepping } from './independent-check';
import { prepareSeismicRun, runForward, withLongLookAhead, type SeismicRun } from './seismic-run';
import type { Alternative, ForecastResult, PlanResult, PlanSpec, RatesSpec, Scenario } from './types';

/** The search ends when the plan in hand is this close to the bound. */
const TARGET_GAP = 2e-4;
const MOST_ROUNDS = 120;
/** A plan farther from its bound than this, beyond what polishing may spend, says so. */
const NOTABLE_GAP = 0.005;
const CHECK_REFINEMENTS = [1, 3, 6];
/** Relative error of the counts in time, given away so that the bound is one for the exact count too. */
const COUNT_ERROR = 2e-4;
/** Of the background's events: in a shadow as deep as this nothing is left to certify. */
const NEGLIGIBLE_SHARE = 1e-3;
/** Heat that falls short by less than this, relatively, is round-off. */
const HEAT_TOLERANCE = 1e-6;

export async function planScenario(scenario: Scenario, hooks: Hooks = {}): Promise<PlanResult> {
  const startedS = hooks.now?.() ?? 0;
  const plan = scenario.plan;
  if (!plan) throw new ScenarioError([{ path: '$.plan', message: 'is missing: there is nothing to plan' }]);
  if (!scenario.wells.some((well) => well.control)) {
    throw new ScenarioError([
      { path: '$.wells', message: 'none has control: true, so there is nothing to plan' },
    ]);
  }
  let furthest = 0;
  const progress = (from: number, to: number, step: string) => (fraction: number) => {
    furthest = Math.max(furthest, from + (to - from) * fraction);
    hooks.onProgress?.(furthest, step);
  };

  progress(0, 0.15, 'Computing how each well moves the pressure')(0);
  const model = buildFieldModel(scenario, weeksToForecast(scenario), {
    ...hooks,
    onProgress: (fraction, step) => hooks.onProgress?.(0.15 * fraction, step),
  });
  progress(0.15, 0.25, 'Running the seismicity over the measured history')(0);
  const run = prepareSeismicRun(
    model,
    Array.from({ length: model.totalWeeks }, (_, week) => week < plan.weeks),
  );
  const fixed = fixedRates(model, plan);
  const columns = controlColumns(model, plan);
  const hold = model.wells.map((well) => new Float64Array(plan.weeks).fill(well.lastRateM3PerS));
  // Caps look at every week; without them the look-ahead may be counted in longer panels.
  const searchRun = plan.caps.length > 0 ? run : withLongLookAhead(run, plan.weeks);
  const rows = planRows(model, plan, columns, fixed);
  const program = planProgram(searchRun, plan, columns, rows, fixed, [pointOf(columns, hold)]);
  const best = await search(
    model,
    program,
    columns,
    hooks,
    progress(
      0.25,
      0.7,
      plan.objective === 'mostHeat' ? 'Searching for the most heat' : 'Searching for the quietest plan',
    ),
  );

  let x = best.x;
  if (plan.polishTolerance > 0) {
    const report = progress(0.7, 0.8, 'Calming the set-points');
    x = await polish(program, columns, best, plan.polishTolerance, {
      shouldStop: hooks.shouldStop,
      onRound: (round, most) => report(round / most),
    });
  }
  const warnings: string[] = [];
  if (plan.setPointStepM3PerS !== null) {
    progress(0.8, 0.85, 'Rounding to set-points')(0);
    const rows = best.rows as LimitRow[];
    const rounded = await roundToSetPoints(
      program,
      columns,
      rows,
      x,
      plan.setPointStepM3PerS,
      hooks.shouldStop,
    );
    if (rounded) x = rounded;
    else warnings.push('No plan on whole set-point steps keeps every limit, so the rates are not rounded.');
  }

  const rates = ratesOf(model, columns, fixed, x).map((row) => row.map(withoutNoise));
  const forecast = describeForecast(run, heldOn(rates, model.totalWeeks), runForward(run, rates));
  const { expectedEvents } = forecast.totals;
  // The search counts the look-ahead in longer panels: what that changes is taken off the bound.
  const searched = runForward(searchRun, rates).partEvents.reduce((a, b) => a + b, 0);
  const certificate = certify(program, best, forecast, plan, Math.abs(searched - expectedEvents));
  const { gap } = certificate;
  if (gap > NOTABLE_GAP + plan.polishTolerance)
    warnings.push(`The plan may be up to ${(100 * gap).toFixed(1)} % from the best possible.`);
  warnings.push(...lookAheadWarnings(model, plan, forecast));

  const split = evenSplit(model, plan, columns, fixed, rates);
  const alternative = (alternativeRates: Float64Array[]) =>
    describeAlternative(run, plan, columns, fixed, alternativeRates);
  const comparison = { hold: alternative(hold), evenSplit: split && alternative(split) };
  const check = checkPlan(
    model,
    rates,
    expectedEvents,
    hooks,
    progress(0.85, 1, 'Checking the plan by independent time-stepping'),
  );

  return {
    ...forecast,
    diagnostics: { ...forecast.diagnostics, warnings: [...forecast.diagnostics.warnings, ...warnings] },
    rates: asSpecs(model, rates),
    expectedEvents,
    ...certificate,
    binding: bindingLimits(best, columns, program),
    comparison,
    check,
    rounds: best.rounds,
    seconds: (hooks.now?.() ?? 0) - startedS,
  };
}

async function search(
  model: FieldModel,
  program: PlanProgram,
  columns: ControlColumns,
  hooks: Hooks,
  report: (fraction: number) => void,
): Promise<CuttingPlaneResult> {
  report(0);
  try {
    return await minimiseConvex(program, {
      relativeGap: TARGET_GAP,
      smallestValue: NEGLIGIBLE_SHARE,
      mostRounds: MOST_ROUNDS,
      shouldStop: hooks.shouldStop,
      onRound: (_round, gap) => {
        // The gap falls about geometrically, from order 1 to the target.
        report(Math.min(1, Math.max(0, Math.log(Math.max(gap, TARGET_GAP)) / Math.log(TARGET_GAP))));
      },
    });
  } catch (error) {
    if (!(error instanceof InfeasibleError)) throw error;
    throw await explainCollision(columns, error.rows as LimitRow[], (x) =>
      brokenPressureRows(model, columns, fixedRates(model, model.scenario.plan!), x),
    );
  }
}

/** Wells that the plan may not move: as given, else at their last measured rate; an outage stops them too. */
function fixedRates(model: FieldModel, plan: PlanSpec): Float64Array[] {
  const given = new Map(model.scenario.rates.map((entry) => [entry.well, entry.weeklyM3PerS]));
  return model.wells.map((well) =>
    Float64Array.from({ length: plan.weeks }, (_, week) =>
      isOut(well, week) ? 0 : (weekly(given.get(well.spec.name) ?? [], week) ?? well.lastRateM3PerS),
    ),
  );
}

/** 0.0295 for 0.029500000000000002. */
const withoutNoise = (rateM3PerS: number) => Number(rateM3PerS.toPrecision(12));

function pointOf(columns: ControlColumns, rates: readonly Float64Array[]): Float64Array {
  const x = new Float64Array(columns.lower.length);
  columns.controls.forEach(({ index }, c) => {
    for (let week = 0; week < columns.weeks; week++)
      x[c * columns.weeks + week] = rates[index][week] / RATE_SCALE;
  });
  return x;
}

function heldOn(rates: readonly Float64Array[], weeks: number): Float64Array[] {
  return rates.map((row) =>
    Float64Array.from({ length: weeks }, (_, week) => row[Math.min(week, row.length - 1)]),
  );
}

const sum = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);

function asSpecs(model: FieldModel, rates: readonly Float64Array[]): RatesSpec[] {
  return model.wells.map((well, j) => ({ well: well.spec.name, weeklyM3PerS: [...rates[j]] }));
}

/** How far the plan can be from the best, in the objective's own terms. */
function certify(
  program: PlanProgram,
  best: CuttingPlaneResult,
  { weeks, totals }: ForecastResult,
  plan: PlanSpec,
  countedDifferently: number,
): Pick<PlanResult, 'lowerBound' | 'gap' | 'heatJ' | 'heatUpperBoundJ'> {
  if (program.unit === 'J') {
    const heatJ = sum(weeks.slice(0, plan.weeks).map((week) => week.heatJ));
    const heatUpperBoundJ = Math.max(heatJ, -(best.lowerBound + program.offset) * program.perUnit);
    return {
      lowerBound: null,
      heatJ,
      heatUpperBoundJ,
      gap: heatUpperBoundJ > 0 ? 1 - heatJ / heatUpperBoundJ : 0,
    };
  }
  const { expectedEvents } = totals;
  const bound = best.lowerBound * program.perUnit - countedDifferently - COUNT_ERROR * expectedEvents;
  const lowerBound = Math.max(0, Math.min(bound, expectedEvents));
  const gap = (expectedEvents - lowerBound) / Math.max(expectedEvents, NEGLIGIBLE_SHARE * program.perUnit);
  return { lowerBound, gap };
}

function describeAlternative(
  run: SeismicRun,
  plan: PlanSpec,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
  rates: Float64Array[],
): Alternative {
  const { model } = run;
  const count = runForward(run, rates);
  const { weeks, totals } = describeForecast(run, heldOn(rates, model.totalWeeks), count);
  const planWeeks = Array.from({ length: plan.weeks }, (_, week) => week);
  return {
    expectedEvents: totals.expectedEvents,
    rateMultiple: totals.rateMultiple,
    heatJ: sum(planWeeks.map((week) => weeklyHeatJ(model, rates, week))),
    weeklyRateMultiple: weeks.map((week) => week.rateMultiple),
    weeklyHeatJ: weeks.map((week) => week.heatJ),
    meetsTargets: planWeeks.every((week) => {
      const target = weekly(plan.heatTargetJPerWeek, week);
      return target === null || weeks[week].heatJ >= target * (1 - HEAT_TOLERANCE);
    }),
    breaks: brokenLimits(model, plan, columns, fixed, rates, count),
    rates: asSpecs(model, rates),
  };
}

function checkPlan(
  model: FieldModel,
  rates: readonly Float64Array[],
  expectedEvents: number,
  hooks: Hooks,
  report: (fraction: number) => void,
): PlanResult['check'] {
  let checkedEvents = NaN;
  let relativeDifference = Infinity;
  // Where aσ is small the quick check itself can be off by a percent: a finer one decides.
  for (const refinement of CHECK_REFINEMENTS) {
    checkedEvents = checkByTimeStepping(model, rates, refinement, {
      ...hooks,
      onProgress: report,
    }).expectedEvents;
    relativeDifference = Math.abs(checkedEvents / expectedEvents - 1);
    if (relativeDifference <= CHECK_LIMIT / 3) break;
  }
  if (!(relativeDifference <= CHECK_LIMIT)) {
    throw new NumericalError('the independent time-stepping does not confirm the plan', {
      expectedEvents,
      checkedEvents,
    });
  }
  return { expectedEvents: checkedEvents, relativeDifference };
}

/** Pressure limits that the last rates would pass if they were held on after the plan. */
function lookAheadWarnings(model: FieldModel, plan: PlanSpec, { weeks }: ForecastResult): string[] {
  return model.wells.flatMap(({ spec }, j) => {
    const passing = weeks.slice(plan.weeks).filter(({ wells }) => {
      const { bottomHoleMinPa, bottomHoleMaxPa } = wells[j];
      return (
        (spec.maxPressurePa !== null && bottomHoleMaxPa > spec.maxPressurePa) ||
        (spec.minPressurePa !== null && bottomHoleMinPa < spec.minPressurePa)
      );
    });
    if (passing.length === 0) return [];
    return [
      `Held on after the plan, the last rates would take ${spec.name} past its pressure limit ${inWeeks(passing.map(({ week }) => week))}.`,
    ];
  });
}
