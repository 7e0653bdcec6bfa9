/**
 * The plan with the fewest expected events over its weeks and the look-ahead in which its last rates are held.
 *
 *   min Σ_zones N_zone(q)  subject to the limits of plan-limits.ts
 *
 * Method    N is convex in the rates (Heimisson & Segall's closed form is a log-sum-exp of affine terms), so the
 *           cuts of cutting-plane.ts certify the answer; gradients are those of the discretised count (adjoint).
 * Source    Heimisson E.R. & Segall P. (2018), JGR Solid Earth 123, 4141–4156 (closed form).
 * Units     parts of the program are in units of the background's events over the same time
 */
import { SECONDS_PER_WEEK } from '../constants';
import { gradientByRates, runForward, type SeismicRun } from '../scenario/seismic-run';
import { brokenPressureRows, RATE_SCALE, ratesOf, type ControlColumns, type LimitRow } from './plan-limits';
import type { ConvexProgram, ConvexValue } from './cutting-plane';

export interface QuietestProgram extends ConvexProgram {
  /** Events per unit of the program's value. */
  eventsPerUnit: number;
}

export function quietestProgram(
  run: SeismicRun,
  columns: ControlColumns,
  rows: LimitRow[],
  fixed: readonly Float64Array[],
  startPoints: Float64Array[],
): QuietestProgram {
  const { model } = run;
  const eventsPerUnit = model.background.totalPerS * model.totalWeeks * SECONDS_PER_WEEK;
  return {
    lower: columns.lower,
    upper: columns.upper,
    rows,
    startPoints,
    leastPart: 0,
    eventsPerUnit,
    evaluate: (x) => evaluate(run, columns, fixed, eventsPerUnit, x),
    violatedRows: (x) => brokenPressureRows(model, columns, fixed, x),
  };
}

function evaluate(
  run: SeismicRun,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
  eventsPerUnit: number,
  x: Float64Array,
): ConvexValue {
  const count = runForward(run, ratesOf(run.model, columns, fixed, x), true);
  const parts = Array.from(count.partEvents, (events) => events / eventsPerUnit);
  const gradients = count.gradient!.map((byCoefficients) => {
    const byWell = gradientByRates(run, byCoefficients, columns.weeks);
    const gradient = new Float64Array(x.length);
    columns.controls.forEach(({ index }, c) => {
      for (let week = 0; week < columns.weeks; week++) {
        gradient[c * columns.weeks + week] = (byWell[index][week] * RATE_SCALE) / eventsPerUnit;
      }
    });
    return gradient;
  });
  return { parts, gradients };
}

export const sum = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);
