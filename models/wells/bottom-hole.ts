/**
 * Bottom-hole and observer pressures from the response library.
 *
 *   p_bh,j(t) = p_initial + Σ_i φ_i(x_j)·a_i(t) + q_j(t)·drawdown_j
 *
 * Units     Pa absolute for wells · Pa of overpressure for observers · rates m³/s, injection positive
 */
import { SECONDS_PER_WEEK } from '../constants';
import { amplitudesAt } from '../diffusion/amplitudes';
import { stepFactor } from '../diffusion/response-library';
import type { FieldModel } from '../scenario/field-model';
import { stepsWith } from '../scenario/seismic-run';

/**
 * Positions inside a week at which pressures are looked at, dense after its start where they bend; a position need
 * not be whole.
 */
export const WEEK_POINTS = 32;
export const weekPointS = (point: number) => SECONDS_PER_WEEK * (point / WEEK_POINTS) ** 2.5;

export interface WeekPressures {
  endPa: number;
  minPa: number;
  maxPa: number;
}

/** Pressures of every well and of the first weeks: result[well][week]; from just after a week's change to its end. */
export function bottomHolePressures(
  model: FieldModel,
  weeklyM3PerS: readonly ArrayLike<number>[],
  weeks = model.totalWeeks,
): WeekPressures[][] {
  const timesS: number[] = [];
  for (let week = 0; week < weeks; week++) {
    for (let point = 0; point < WEEK_POINTS; point++)
      timesS.push(week * SECONDS_PER_WEEK + weekPointS(point));
  }
  timesS.push(weeks * SECONDS_PER_WEEK);
  const cellPressure = overpressureAt(
    model,
    weeklyM3PerS,
    model.wells.map((well) => well.cell),
    timesS,
  );
  return model.wells.map((well, j) =>
    Array.from({ length: weeks }, (_, week) => {
      const weekly = weeklyM3PerS[j];
      const rate = well.sign * weekly[Math.min(week, weekly.length - 1)];
      const offset = model.scenario.reservoir.initialPressurePa + rate * well.drawdownPaPerM3PerS;
      const pressures = cellPressure[j].subarray(week * WEEK_POINTS, (week + 1) * WEEK_POINTS + 1);
      return {
        endPa: offset + pressures[WEEK_POINTS],
        minPa: offset + extreme(pressures, 'min').value,
        maxPa: offset + extreme(pressures, 'max').value,
      };
    }),
  );
}

/**
 * The largest or smallest of evenly spaced values, between them as well: the vertex of the parabola through the
 * three round the extreme one.
 */
export function extreme(values: ArrayLike<number>, which: 'min' | 'max'): { value: number; point: number } {
  const sign = which === 'max' ? 1 : -1;
  let at = 0;
  for (let i = 1; i < values.length; i++) if (sign * values[i] > sign * values[at]) at = i;
  const value = values[at];
  if (at === 0 || at === values.length - 1) return { value, point: at };
  const [before, after] = [values[at - 1], values[at + 1]];
  const bend = before - 2 * value + after;
  if (bend === 0) return { value, point: at };
  const shift = (before - after) / (2 * bend);
  return { value: value - ((before - after) * shift) / 4, point: at + shift };
}

/** Overpressure of given cells at given ascending times: result[place][time]. */
export function overpressureAt(
  model: FieldModel,
  weeklyM3PerS: readonly ArrayLike<number>[],
  cells: readonly number[],
  timesS: ArrayLike<number>,
): Float64Array[] {
  const result = cells.map(() => new Float64Array(timesS.length));
  const steps = stepsWith(model, weeklyM3PerS);
  model.library.wells.forEach((response, i) => {
    const rows = amplitudesAt(response, steps[i], timesS);
    cells.forEach((cell, place) => {
      const from = cell * response.count;
      for (let at = 0; at < timesS.length; at++) {
        let sum = 0;
        for (let k = 0; k < response.count; k++)
          sum += response.modes[from + k] * rows[at * response.count + k];
        result[place][at] += sum;
      }
    });
  });
  return result;
}

/**
 * How the bottom-hole pressure of well `j` at time `timeS` (in week `week`) moves with every weekly magnitude of
 * well `i`: result[k] for the weeks 0 … weeks−1, the last one held from its start on.
 */
export function pressureSensitivity(
  model: FieldModel,
  j: number,
  timeS: number,
  week: number,
  i: number,
  weeks: number,
): Float64Array {
  const response = model.library.wells[i];
  const { sign } = model.wells[i];
  const from = model.wells[j].cell * response.count;
  const sensitivity = new Float64Array(weeks);
  for (let k = 0; k <= Math.min(week, weeks - 1); k++) {
    const startS = timeS - k * SECONDS_PER_WEEK;
    const endS = k === weeks - 1 ? 0 : Math.max(0, timeS - (k + 1) * SECONDS_PER_WEEK);
    let sum = 0;
    for (let mode = 0; mode < response.count; mode++) {
      const decay = response.decayPerS[mode];
      sum +=
        response.modes[from + mode] *
        response.input[mode] *
        (stepFactor(decay, startS) - stepFactor(decay, endS));
    }
    sensitivity[k] = sign * sum;
  }
  if (i === j) sensitivity[Math.min(week, weeks - 1)] += sign * model.wells[j].drawdownPaPerM3PerS;
  return sensitivity;
}
