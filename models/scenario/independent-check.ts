/**
 * The finished plan once more by another route: fresh time-stepping of the pressure from the first day of the
 * history and step-by-step rate-and-state per cell. No response library, no panels, no linearisation.
 */
import { SECONDS_PER_DAY, SECONDS_PER_WEEK } from '../constants';
import { DiffusionOperator } from '../diffusion/operator';
import { stepPressure } from '../diffusion/time-stepping';
import { logFOverLinearStep } from '../seismicity/rate-state';
import type { FieldModel, Hooks } from './field-model';
import { stepsWith } from './seismic-run';

export interface CheckResult {
  /** Per week (plan, then look-ahead) and group: counts[week * groups + group]. */
  counts: Float64Array;
  groups: number;
  expectedEvents: number;
  steps: number;
}

/** How finely a stretch of time is stepped. */
interface Fineness {
  /** Accepted error of a step in units of aσ/f. */
  stressTolerance: number;
  firstStepS: number;
}

/**
 * Leaves weekly counts within 0.3 % even where aσ is small; what the first days of a past week did matters less
 * than what a coming one does.
 */
const PAST: Fineness = { stressTolerance: 4, firstStepS: 7 * SECONDS_PER_DAY };
const FUTURE: Fineness = { stressTolerance: 0.2, firstStepS: SECONDS_PER_DAY };

/** `refinement` shortens all steps and tightens the tolerance; 1 is enough for a check within 1 %. */
export function checkByTimeStepping(
  model: FieldModel,
  weeklyM3PerS: readonly ArrayLike<number>[],
  refinement = 1,
  hooks: Hooks = {},
): CheckResult {
  const { background, rateState, totalWeeks, wells } = model;
  const { cells, ratePerS, groupStart } = background;
  const operator = new DiffusionOperator(model.grid);
  const rateSteps = stepsWith(model, weeklyM3PerS);
  const changes = new Set([0]);
  for (const list of rateSteps) for (const step of list) if (step.fromS < 0) changes.add(step.fromS);
  const pastEdgesS = [...changes].sort((a, b) => a - b);
  const futureEdgesS = Array.from({ length: totalWeeks + 1 }, (_, week) => week * SECONDS_PER_WEEK);
  const startS = pastEdgesS[0];
  const spanS = futureEdgesS[totalWeeks] - startS;

  const groups = background.groupRatePerS.length;
  const counts = new Float64Array(totalWeeks * groups);
  const pressure = new Float64Array(operator.size);
  const stressBefore = new Float64Array(cells.length);
  const logRate = new Float64Array(cells.length);

  const countStep = (now: Float64Array, lengthS: number, endS: number) => {
    const week = Math.ceil(endS / SECONDS_PER_WEEK - 1e-9) - 1;
    for (let group = 0; group < groups; group++) {
      let events = 0;
      for (let at = groupStart[group]; at < groupStart[group + 1]; at++) {
        const stress = rateState.stressPerPa * now[cells[at]];
        const rise = stress - stressBefore[at] + lengthS / rateState.relaxationS;
        const logF = logFOverLinearStep(logRate[at], rise, lengthS, rateState.relaxationS);
        events += ratePerS[at] * rateState.relaxationS * logF;
        logRate[at] += rise - logF;
        stressBefore[at] = stress;
      }
      if (week >= 0) counts[week * groups + group] += events;
    }
  };
  const advance = (edgesS: readonly number[], { stressTolerance, firstStepS }: Fineness) => {
    const sourceOf = (interval: number, source: Float64Array) => {
      hooks.onProgress?.(
        (edgesS[interval] - startS) / spanS,
        'Checking the plan by independent time-stepping',
      );
      wells.forEach((well, j) => {
        let rate = 0;
        for (const step of rateSteps[j]) if (step.fromS <= edgesS[interval]) rate = step.rateM3PerS;
        source[well.cell] += rate;
      });
    };
    const options = {
      tolerancePa: stressTolerance / rateState.stressPerPa / refinement ** 2,
      firstStepS: firstStepS / refinement,
      shareSinceChange: 1.5 / refinement,
      longestStepS: SECONDS_PER_WEEK / refinement,
      shouldStop: hooks.shouldStop,
    };
    return stepPressure(operator, pressure, edgesS, sourceOf, options, countStep).steps;
  };
  const steps = advance(pastEdgesS, PAST) + advance(futureEdgesS, FUTURE);
  return { counts, groups, expectedEvents: counts.reduce((a, b) => a + b, 0), steps };
}

export const CHECK_LIMIT = 0.01;
