/**
 * The finished plan once more by another route: fresh time-stepping of the pressure from the first day of the
 * history and step-by-step rate-and-state per cell. No response library, no panels, no linearisation.
 */
import { SECONDS_PER_WEEK } from '../constants';
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

/** `refinement` shortens all steps and tightens the tolerance; 1 is enough for a check within 1 %. */
export function checkByTimeStepping(
  model: FieldModel,
  weeklyM3PerS: readonly ArrayLike<number>[],
  refinement = 1,
  hooks: Hooks = {},
): CheckResult {
  const { background, rateState, totalWeeks, wells } = model;
  const operator = new DiffusionOperator(model.grid);
  const steps = stepsWith(model, weeklyM3PerS);
  const edges = new Set<number>();
  for (const list of steps) for (const step of list) if (step.fromS < 0) edges.add(step.fromS);
  for (let week = 0; week <= totalWeeks; week++) edges.add(week * SECONDS_PER_WEEK);
  const edgesS = [...edges].sort((a, b) => a - b);

  const { cells, ratePerS, groupStart } = background;
  const groups = background.groupRatePerS.length;
  const counts = new Float64Array(totalWeeks * groups);
  const pressure = new Float64Array(operator.size);
  const before = new Float64Array(cells.length);
  const logRate = new Float64Array(cells.length);
  const spanS = edgesS[edgesS.length - 1] - edgesS[0];
  const result = stepPressure(
    operator,
    pressure,
    edgesS,
    (interval, source) => {
      hooks.onProgress?.(
        (edgesS[interval] - edgesS[0]) / spanS,
        'Checking the plan by independent time-stepping',
      );
      wells.forEach((well, j) => {
        let rate = 0;
        for (const step of steps[j]) if (step.fromS <= edgesS[interval]) rate = step.rateM3PerS;
        source[well.cell] += rate;
      });
    },
    {
      tolerancePa: 0.01 / rateState.stressPerPa / refinement ** 2,
      firstStepS: 7200 / refinement,
      shareSinceChange: 0.5 / refinement,
      longestStepS: SECONDS_PER_WEEK / refinement,
      shouldStop: hooks.shouldStop,
    },
    (now, lengthS, endS) => {
      const week = Math.ceil(endS / SECONDS_PER_WEEK - 1e-9) - 1;
      for (let group = 0; group < groups; group++) {
        let events = 0;
        for (let at = groupStart[group]; at < groupStart[group + 1]; at++) {
          const stress = rateState.stressPerPa * now[cells[at]];
          const rise = stress - before[at] + lengthS / rateState.relaxationS;
          const logF = logFOverLinearStep(logRate[at], rise, lengthS, rateState.relaxationS);
          events += ratePerS[at] * rateState.relaxationS * logF;
          logRate[at] += rise - logF;
          before[at] = stress;
        }
        if (week >= 0) counts[week * groups + group] += events;
      }
    },
  );
  return { counts, groups, expectedEvents: counts.reduce((a, b) => a + b, 0), steps: result.steps };
}

export const CHECK_LIMIT = 0.01;
