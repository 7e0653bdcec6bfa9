/** The forecast of a scenario's rates. */
import { SECONDS_PER_WEEK } from '../constants';
import { ScenarioError } from '../errors';
import { cellAt } from '../grid/grid';
import type { CountResult } from '../seismicity/field-count';
import { MODEL_VERSION } from '../version';
import { bottomHolePressures, overpressureAt } from '../wells/bottom-hole';
import { buildFieldModel, type FieldModel, type Hooks } from './field-model';
import { prepareSeismicRun, runForward, type SeismicRun } from './seismic-run';
import type { Diagnostics, ForecastResult, Scenario, WeekForecast } from './types';

export function forecastScenario(scenario: Scenario, hooks: Hooks = {}): ForecastResult {
  if (!scenario.plan && scenario.rates.length === 0) {
    throw new ScenarioError([
      { path: '$.rates', message: 'is empty and there is no plan: how many weeks to forecast is not known' },
    ]);
  }
  const totalWeeks = weeksToForecast(scenario);
  const model = buildFieldModel(scenario, totalWeeks, hooks);
  hooks.onProgress?.(0.8, 'Running the seismicity over the history and the weeks ahead');
  const rates = givenRates(model);
  // In a plan's weeks any rate may change: counted as the planner counts them, its rates give its numbers again.
  const planWeeks = scenario.plan?.weeks ?? 0;
  const changed = Array.from(
    { length: totalWeeks },
    (_, week) => week === 0 || week < planWeeks || rates.some((row) => row[week] !== row[week - 1]),
  );
  const run = prepareSeismicRun(model, changed);
  return describeForecast(run, rates, runForward(run, rates));
}

/** Weeks of the plan and its look-ahead, else as many as the longest list of rates. */
export function weeksToForecast(scenario: Scenario): number {
  if (scenario.plan) return scenario.plan.weeks + scenario.plan.lookAheadWeeks;
  return scenario.rates.reduce((most, entry) => Math.max(most, entry.weeklyM3PerS.length), 1);
}

/** Weekly magnitudes of every well; one entry holds for all weeks, a well without holds its last history rate. */
export function givenRates(model: FieldModel): Float64Array[] {
  const given = new Map(model.scenario.rates.map((entry) => [entry.well, entry.weeklyM3PerS]));
  return model.wells.map((well) => {
    const weekly = given.get(well.spec.name);
    return Float64Array.from({ length: model.totalWeeks }, (_, week) =>
      weekly ? weekly[Math.min(week, weekly.length - 1)] : well.lastRateM3PerS,
    );
  });
}

/** Weekly heat delivered, J. */
export function weeklyHeatJ(model: FieldModel, rates: readonly ArrayLike<number>[], week: number): number {
  return model.wells.reduce((sum, well, j) => {
    const rate = rates[j][Math.min(week, rates[j].length - 1)];
    return well.spec.kind === 'producer' ? sum + rate * well.spec.heatJPerM3 * SECONDS_PER_WEEK : sum;
  }, 0);
}

export function describeForecast(
  run: SeismicRun,
  rates: readonly Float64Array[],
  count: CountResult,
): ForecastResult {
  const { model } = run;
  const { background, totalWeeks, scenario } = model;
  const pressures = bottomHolePressures(model, rates);
  const observerCells = scenario.observers.map((observer) => cellAt(model.grid, observer.xM, observer.yM));
  const weekEndsS = Array.from({ length: totalWeeks }, (_, week) => (week + 1) * SECONDS_PER_WEEK);
  const atObservers = overpressureAt(model, rates, observerCells, weekEndsS);
  const backgroundPerWeek = background.totalPerS * SECONDS_PER_WEEK;
  const weeks = weekEndsS.map((_, week): WeekForecast => {
    const byGroup = count.counts.subarray(week * count.groups, (week + 1) * count.groups);
    const expectedEvents = byGroup.reduce((a, b) => a + b, 0);
    return {
      week: week + 1,
      expectedEvents,
      rateMultiple: expectedEvents / backgroundPerWeek,
      zones: scenario.seismicity.zones.map((zone, group) => {
        const expected = background.groupRatePerS[group] * SECONDS_PER_WEEK;
        return {
          name: zone.name,
          expectedEvents: byGroup[group],
          rateMultiple: expected > 0 ? byGroup[group] / expected : null,
        };
      }),
      wells: model.wells.map((well, j) => {
        const { endPa, minPa, maxPa } = pressures[j][week];
        return {
          name: well.spec.name,
          bottomHoleEndPa: endPa,
          bottomHoleMinPa: minPa,
          bottomHoleMaxPa: maxPa,
        };
      }),
      observers: scenario.observers.map((observer, place) => ({
        name: observer.name,
        overpressurePa: atObservers[place][week],
      })),
      heatJ: weeklyHeatJ(model, rates, week),
    };
  });
  const expectedEvents = weeks.reduce((sum, week) => sum + week.expectedEvents, 0);
  const backgroundEvents = backgroundPerWeek * totalWeeks;
  return {
    weeks,
    totals: {
      expectedEvents,
      backgroundEvents,
      rateMultiple: expectedEvents / backgroundEvents,
      heatJ: weeks.reduce((sum, week) => sum + week.heatJ, 0),
    },
    modelVersion: MODEL_VERSION,
    diagnostics: diagnosticsOf(run),
  };
}

function diagnosticsOf(run: SeismicRun): Diagnostics {
  const { library, grid, warnings } = run.model;
  return {
    cells: grid.nx * grid.ny,
    responseModes: library.wells.reduce((sum, well) => sum + well.count, 0),
    responseErrorEstimate: library.wells.reduce((most, well) => Math.max(most, well.errorEstimate), 0),
    warnings,
  };
}
