/**
 * The linear limits of a plan: bounds, outages, ramps, heat, mass balance, bottom-hole pressures.
 *
 * Columns are x[c*weeks + w] = magnitude of control well c in week w, in units of RATE_SCALE; rows are scaled to
 * about 1. Each limit knows how to say itself, its amount and its price in SI.
 *
 * Units     rates m³/s · heat J per week · pressures Pa
 */
import { SECONDS_PER_WEEK } from '../constants';
import type { FieldModel, WellModel } from '../scenario/field-model';
import type { PlanSpec } from '../scenario/types';
import {
  bottomHolePressures,
  extreme,
  overpressureAt,
  pressureSensitivity,
  weekPointS,
  WEEK_POINTS,
} from '../wells/bottom-hole';
import { FEASIBILITY, type LinearRow } from './linear-program';

/** One scaled unit of rate, m³/s. */
export const RATE_SCALE = 0.01;
/** One scaled unit of pressure, Pa. */
const PRESSURE_SCALE = 1e6;
/** What a row of the program may be missed by, Pa. */
const PRESSURE_TOLERANCE_PA = FEASIBILITY * PRESSURE_SCALE;

export type LimitName =
  | 'minRate'
  | 'maxRate'
  | 'outage'
  | 'ramp'
  | 'heatTarget'
  | 'heatCeiling'
  | 'massBalance'
  | 'minPressure'
  | 'maxPressure'
  | 'cap';

export interface PlanLimit {
  name: LimitName;
  well?: string;
  /** Of a cap: the field or a zone's name. */
  scope?: string;
  /** 1-based. */
  week?: number;
  /** What one scaled unit of the row or bound is in `unit`. */
  siPerUnit: number;
  unit: 'm3/s' | 'J' | 'Pa' | 'events';
}

export interface LimitRow extends LinearRow {
  limit: PlanLimit;
}

export interface ControlColumns {
  weeks: number;
  controls: { well: WellModel; index: number }[];
  lower: Float64Array;
  upper: Float64Array;
  /** Whether a well is out in a week: [c*weeks + w]. */
  outage: boolean[];
}

export function weekly(list: readonly number[], week: number): number | null {
  return list.length === 0 ? null : list[Math.min(week, list.length - 1)];
}

export function isOut(well: WellModel, week: number): boolean {
  return well.spec.outages.some((outage) => week + 1 >= outage.fromWeek && week + 1 <= outage.toWeek);
}

export function controlColumns(model: FieldModel, plan: PlanSpec): ControlColumns {
  const controls = model.wells
    .map((well, index) => ({ well, index }))
    .filter(({ well }) => well.spec.control);
  const size = controls.length * plan.weeks;
  const lower = new Float64Array(size);
  const upper = new Float64Array(size);
  const outage: boolean[] = new Array(size).fill(false);
  controls.forEach(({ well }, c) => {
    for (let week = 0; week < plan.weeks; week++) {
      const v = c * plan.weeks + week;
      outage[v] = isOut(well, week);
      if (outage[v]) continue;
      lower[v] = well.spec.minRateM3PerS / RATE_SCALE;
      upper[v] = (well.spec.maxRateM3PerS ?? unboundedRate(model)) / RATE_SCALE;
    }
  });
  return { weeks: plan.weeks, controls, lower, upper, outage };
}

/** A well without a maximum needs some number in the program: no well of a balanced field moves more than all others. */
function unboundedRate(model: FieldModel): number {
  const known = model.wells.reduce(
    (sum, { spec, lastRateM3PerS }) => sum + Math.max(spec.maxRateM3PerS ?? 0, lastRateM3PerS),
    0,
  );
  return Math.max(10, 10 * known);
}

/** Weekly magnitudes of every well for a point of the program; wells that the plan may not move as given. */
export function ratesOf(
  model: FieldModel,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
  x: Float64Array,
): Float64Array[] {
  const rates = fixed.map((row) => row.slice(0, columns.weeks));
  columns.controls.forEach(({ index }, c) => {
    for (let week = 0; week < columns.weeks; week++)
      rates[index][week] = x[c * columns.weeks + week] * RATE_SCALE;
  });
  return rates;
}

export function planRows(
  model: FieldModel,
  plan: PlanSpec,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
): LimitRow[] {
  return [
    ...rampRows(columns),
    ...heatRows(model, plan, columns, fixed),
    ...balanceRows(model, plan, columns, fixed),
  ];
}

function rampRows({ weeks, controls, outage }: ControlColumns): LimitRow[] {
  const rows: LimitRow[] = [];
  controls.forEach(({ well }, c) => {
    const { maxChangeM3PerSPerWeek: most, name } = well.spec;
    if (most === null) return;
    const reach = most / RATE_SCALE;
    for (let week = 0; week < weeks; week++) {
      const v = c * weeks + week;
      // Steps into and out of an outage are free.
      if (outage[v] || (week > 0 && outage[v - 1])) continue;
      const limit: PlanLimit = {
        name: 'ramp',
        well: name,
        week: week + 1,
        siPerUnit: RATE_SCALE,
        unit: 'm3/s',
      };
      if (week === 0) {
        const last = well.lastRateM3PerS / RATE_SCALE;
        rows.push({ lower: last - reach, upper: last + reach, indices: [v], values: [1], limit });
      } else {
        rows.push({ lower: -reach, upper: reach, indices: [v - 1, v], values: [-1, 1], limit });
      }
    }
  });
  return rows;
}

function heatRows(
  model: FieldModel,
  plan: PlanSpec,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
): LimitRow[] {
  const rows: LimitRow[] = [];
  const scale = Math.max(...plan.heatTargetJPerWeek, ...plan.heatCeilingJPerWeek, 0);
  if (scale === 0) return rows;
  for (let week = 0; week < plan.weeks; week++) {
    let given = 0;
    model.wells.forEach((well, j) => {
      if (!well.spec.control && well.sign < 0)
        given += fixed[j][week] * well.spec.heatJPerM3 * SECONDS_PER_WEEK;
    });
    const indices: number[] = [];
    const values: number[] = [];
    columns.controls.forEach(({ well }, c) => {
      if (well.sign > 0 || well.spec.heatJPerM3 === 0) return;
      indices.push(c * columns.weeks + week);
      values.push((well.spec.heatJPerM3 * RATE_SCALE * SECONDS_PER_WEEK) / scale);
    });
    const target = weekly(plan.heatTargetJPerWeek, week);
    const ceiling = weekly(plan.heatCeilingJPerWeek, week);
    const common = { indices, values };
    if (target !== null) {
      const limit: PlanLimit = { name: 'heatTarget', week: week + 1, siPerUnit: scale, unit: 'J' };
      rows.push({ ...common, lower: (target - given) / scale, upper: Infinity, limit });
    }
    if (ceiling !== null) {
      const limit: PlanLimit = { name: 'heatCeiling', week: week + 1, siPerUnit: scale, unit: 'J' };
      rows.push({ ...common, lower: -Infinity, upper: (ceiling - given) / scale, limit });
    }
  }
  return rows;
}

function balanceRows(
  model: FieldModel,
  plan: PlanSpec,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
): LimitRow[] {
  const share = (well: WellModel) => (well.sign > 0 ? 1 : -(1 - plan.lossFraction));
  return Array.from({ length: plan.weeks }, (_, week): LimitRow => {
    let given = 0;
    model.wells.forEach((well, j) => {
      if (!well.spec.control) given += (share(well) * fixed[j][week]) / RATE_SCALE;
    });
    return {
      lower: -given,
      upper: -given,
      indices: columns.controls.map((_, c) => c * columns.weeks + week),
      values: columns.controls.map(({ well }) => share(well)),
      limit: { name: 'massBalance', week: week + 1, siPerUnit: RATE_SCALE, unit: 'm3/s' },
    };
  });
}

/**
 * Bottom-hole limits broken by a set of rates, each as a row at the moment of the week where it is broken most.
 * They bind seldom, so they are added only when a plan in the making breaks them.
 */
export function brokenPressureRows(
  model: FieldModel,
  columns: ControlColumns,
  fixed: readonly Float64Array[],
  x: Float64Array,
): LimitRow[] {
  if (model.wells.every(({ spec }) => spec.minPressurePa === null && spec.maxPressurePa === null)) return [];
  const rates = ratesOf(model, columns, fixed, x);
  const pressures = bottomHolePressures(model, rates, columns.weeks);
  const rows: LimitRow[] = [];
  model.wells.forEach((well, j) => {
    const { minPressurePa, maxPressurePa } = well.spec;
    for (let week = 0; week < columns.weeks; week++) {
      const { minPa, maxPa } = pressures[j][week];
      const add = (name: 'minPressure' | 'maxPressure', limitPa: number) => {
        const row = pressureRow(model, columns, rates, x, j, week, name, limitPa);
        if (row) rows.push(row);
      };
      if (maxPressurePa !== null && maxPa > maxPressurePa + PRESSURE_TOLERANCE_PA)
        add('maxPressure', maxPressurePa);
      if (minPressurePa !== null && minPa < minPressurePa - PRESSURE_TOLERANCE_PA)
        add('minPressure', minPressurePa);
    }
  });
  return rows;
}

/** Null where the pressure, looked at exactly at its extreme moment, keeps the limit after all. */
function pressureRow(
  model: FieldModel,
  columns: ControlColumns,
  rates: readonly Float64Array[],
  x: Float64Array,
  j: number,
  week: number,
  name: 'minPressure' | 'maxPressure',
  limitPa: number,
): LimitRow | null {
  const well = model.wells[j];
  const startS = week * SECONDS_PER_WEEK;
  const timesS = Array.from({ length: WEEK_POINTS + 1 }, (_, point) => startS + weekPointS(point));
  const [sampled] = overpressureAt(model, rates, [well.cell], timesS);
  const worstS = startS + weekPointS(extreme(sampled, name === 'maxPressure' ? 'max' : 'min').point);
  const [[cellPressure]] = overpressureAt(model, rates, [well.cell], [worstS]);
  const rate = well.sign * rates[j][week];
  const nowPa = model.scenario.reservoir.initialPressurePa + cellPressure + rate * well.drawdownPaPerM3PerS;
  const passedByPa = name === 'maxPressure' ? nowPa - limitPa : limitPa - nowPa;
  if (passedByPa <= PRESSURE_TOLERANCE_PA) return null;
  const indices: number[] = [];
  const values: number[] = [];
  let linear = 0;
  columns.controls.forEach(({ index }, c) => {
    const sensitivity = pressureSensitivity(model, j, worstS, week, index, columns.weeks);
    for (let k = 0; k <= week; k++) {
      const value = (sensitivity[k] * RATE_SCALE) / PRESSURE_SCALE;
      if (Math.abs(value) < 1e-11) continue;
      indices.push(c * columns.weeks + k);
      values.push(value);
      linear += value * x[c * columns.weeks + k];
    }
  });
  // nowPa belongs to x: the limit on the linear part is what is left of the limit besides it.
  const room = (limitPa - nowPa) / PRESSURE_SCALE + linear;
  const limit: PlanLimit = {
    name,
    well: well.spec.name,
    week: week + 1,
    siPerUnit: PRESSURE_SCALE,
    unit: 'Pa',
  };
  return name === 'maxPressure'
    ? { lower: -Infinity, upper: room, indices, values, limit }
    : { lower: room, upper: Infinity, indices, values, limit };
}
