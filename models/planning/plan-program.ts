/**
 * A plan as a convex program: what is wanted, and the caps on expected events, over the limits of plan-limits.ts.
 *
 *   quietest   min Σ_parts N_part(q)                     N over the plan's weeks and the look-ahead
 *   mostHeat   max Σ_weeks heat(q)                       in the plan's weeks
 *   caps       N_scope(q; start … end of week k) ≤ multiple · background of the same time, every k
 *
 * Method    N is convex in the rates (Heimisson & Segall's closed form is a log-sum-exp of affine terms), so the
 *           cuts of cutting-plane.ts certify the answer; gradients are those of the discretised count (adjoint).
 *           A cap is linearised for the weeks where it is passed or nearly so; the others are only looked at.
 * Source    Heimisson E.R. & Segall P. (2018), JGR Solid Earth 123, 4141–4156 (closed form).
 * Units     quietest: events of the background over the same time · mostHeat: the heat of all wells at their largest
 *           rate · caps: 1 is the cap
 */
import { SECONDS_PER_WEEK } from '../constants';
import type { FieldModel } from '../scenario/field-model';
import { gradientByRates, runForward, type SeismicRun } from '../scenario/seismic-run';
import type { CapSpec, PlanSpec } from '../scenario/types';
import type { CountResult } from '../seismicity/field-count';
import type { ConvexProgram, ConvexValue } from './cutting-plane';
import { brokenPressureRows, RATE_SCALE, ratesOf, type ControlColumns, type LimitRow } from './plan-limits';

export interface PlanProgram extends ConvexProgram {
  /** Events (quietest) or joules (mostHeat) per unit of the objective. */
  perUnit: number;
  unit: 'events' | 'J';
  /** Objective of what the plan cannot move. */
  offset: number;
}

/** A cap this close to being passed gets its linearisation. */
const NEARLY = 0.98;
/** Round-off of a count against its cap. */
const KEPT = 1 + 1e-9;

export function planProgram(
  run: SeismicRun,
  plan: PlanSpec,
  columns: ControlColumns,
  rows: LimitRow[],
  fixed: readonly Float64Array[],
  startPoints: Float64Array[],
): PlanProgram {
  const { model } = run;
  const { background, totalWeeks } = model;
  const wantsHeat = plan.objective === 'mostHeat';
  const perUnit = wantsHeat
    ? largestHeatJ(run, columns)
    : background.totalPerS * totalWeeks * SECONDS_PER_WEEK;
  const caps = new EventCaps(run, plan.caps);
  const toGradient = (byCoefficients: Float64Array, scale: number) => {
    const byWell = gradientByRates(run, byCoefficients, columns.weeks);
    const gradient = new Float64Array(columns.lower.length);
    columns.controls.forEach(({ index }, c) => {
      for (let week = 0; week < columns.weeks; week++) {
        gradient[c * columns.weeks + week] = byWell[index][week] * RATE_SCALE * scale;
      }
    });
    return gradient;
  };
  const evaluate = (x: Float64Array): ConvexValue => {
    const rates = ratesOf(model, columns, fixed, x);
    const objectiveEnds = wantsHeat ? [] : [run.panels.panels.length];
    let count = runForward(run, rates, [...objectiveEnds, ...caps.weeks]);
    if (caps.watch(count)) count = runForward(run, rates, [...objectiveEnds, ...caps.weeks]);
    const parts = wantsHeat ? [] : Array.from(count.partEvents, (events) => events / perUnit);
    const gradients = wantsHeat ? [] : count.gradients[0].map((part) => toGradient(part, 1 / perUnit));
    const limitRows = caps.near(count).map(({ cap, week, value, limitEvents }) => {
      const end = objectiveEnds.length + caps.weeks.indexOf(week);
      const byCoefficients = caps.sumOfParts(cap, count.gradients[end]);
      return capRow(x, toGradient(byCoefficients, 1 / limitEvents), value, limitEvents, cap.scope, week);
    });
    return { parts, gradients, limitRows, breaksLimit: !caps.areKept(count) };
  };
  return {
    lower: columns.lower,
    upper: columns.upper,
    rows,
    cost: wantsHeat ? heatCost(columns, perUnit) : undefined,
    startPoints,
    leastPart: 0,
    perUnit,
    unit: wantsHeat ? 'J' : 'events',
    offset: wantsHeat ? -fixedHeatJ(run, columns, fixed) / perUnit : 0,
    evaluate,
    violatedRows: (x) => brokenPressureRows(model, columns, fixed, x),
  };
}

/** gradient·x ≤ 1 − (value − gradient·x°) */
function capRow(
  x: Float64Array,
  gradient: Float64Array,
  value: number,
  limitEvents: number,
  scope: string,
  week: number,
): LimitRow {
  let linear = 0;
  const indices: number[] = [];
  const values: number[] = [];
  gradient.forEach((entry, v) => {
    if (Math.abs(entry) < 1e-12) return;
    indices.push(v);
    values.push(entry);
    linear += entry * x[v];
  });
  const limit = { name: 'cap', scope, week, siPerUnit: limitEvents, unit: 'events' } as const;
  return { lower: -Infinity, upper: 1 - value + linear, indices, values, limit };
}

export interface CapValue {
  cap: CapSpec;
  /** Panels counted, which is the week, from 1. */
  week: number;
  /** Events over the cap's events. */
  value: number;
  limitEvents: number;
}

/** The caps and the weeks whose gradients they need, which grow as weeks come near their cap. */
class EventCaps {
  /** Weeks (numbers of panels) for which a gradient is computed, ascending. */
  readonly weeks: number[] = [];

  constructor(
    private readonly run: SeismicRun,
    private readonly caps: readonly CapSpec[],
  ) {}

  /** Adds each cap's worst week where it is passed and not watched yet; true where one was added. */
  watch(count: CountResult): boolean {
    let added = false;
    for (const cap of this.caps) {
      const passed = capValues(this.run.model, cap, count).filter(({ value }) => value > KEPT);
      if (passed.length === 0 || passed.some(({ week }) => this.weeks.includes(week))) continue;
      this.weeks.push(passed.reduce((most, one) => (one.value > most.value ? one : most)).week);
      added = true;
    }
    this.weeks.sort((a, b) => a - b);
    return added;
  }

  near(count: CountResult): CapValue[] {
    return this.caps.flatMap((cap) =>
      capValues(this.run.model, cap, count).filter(
        ({ week, value }) => value > NEARLY && this.weeks.includes(week),
      ),
    );
  }

  areKept(count: CountResult): boolean {
    return this.caps.every((cap) =>
      capValues(this.run.model, cap, count).every(({ value }) => value <= KEPT),
    );
  }

  sumOfParts({ scope }: CapSpec, parts: readonly Float64Array[]): Float64Array {
    const { partGroup } = this.run.model.background;
    const group = groupOf(this.run.model, scope);
    const sum = new Float64Array(parts[0].length);
    parts.forEach((part, index) => {
      if (group !== null && partGroup[index] !== group) return;
      for (let i = 0; i < sum.length; i++) sum[i] += part[i];
    });
    return sum;
  }
}

/** A cap's events from the start to the end of every week, against what it allows. */
export function capValues(model: FieldModel, cap: CapSpec, count: CountResult): CapValue[] {
  const { background, totalWeeks } = model;
  const group = groupOf(model, cap.scope);
  const perS = group === null ? background.totalPerS : background.groupRatePerS[group];
  let events = 0;
  return Array.from({ length: totalWeeks }, (_, at) => {
    for (let g = 0; g < count.groups; g++) {
      if (group === null || g === group) events += count.counts[at * count.groups + g];
    }
    const limitEvents = cap.rateMultiple * perS * (at + 1) * SECONDS_PER_WEEK;
    return { cap, week: at + 1, value: limitEvents > 0 ? events / limitEvents : 0, limitEvents };
  });
}

/** null: the whole field. */
function groupOf(model: FieldModel, scope: string): number | null {
  return scope === 'field' ? null : model.scenario.seismicity.zones.findIndex((zone) => zone.name === scope);
}

/** What all wells would deliver at their largest rate, J over the plan's weeks; at least 1. */
function largestHeatJ({ model }: SeismicRun, { weeks, controls, upper }: ControlColumns): number {
  let sum = 0;
  controls.forEach(({ well }, c) => {
    if (well.sign > 0) return;
    for (let week = 0; week < weeks; week++)
      sum += upper[c * weeks + week] * RATE_SCALE * well.spec.heatJPerM3;
  });
  return Math.max(1, sum * SECONDS_PER_WEEK, model.scenario.plan?.heatTargetJPerWeek[0] ?? 0);
}

function heatCost({ weeks, controls, lower }: ControlColumns, perUnit: number): Float64Array {
  const cost = new Float64Array(lower.length);
  controls.forEach(({ well }, c) => {
    if (well.sign > 0) return;
    const heat = well.spec.heatJPerM3 * RATE_SCALE * SECONDS_PER_WEEK;
    for (let week = 0; week < weeks; week++) cost[c * weeks + week] = -heat / perUnit;
  });
  return cost;
}

function fixedHeatJ(
  { model }: SeismicRun,
  { weeks }: ControlColumns,
  fixed: readonly Float64Array[],
): number {
  let sum = 0;
  model.wells.forEach(({ spec, sign }, j) => {
    if (spec.control || sign > 0) return;
    for (let week = 0; week < weeks; week++) sum += fixed[j][week] * spec.heatJPerM3;
  });
  return sum * SECONDS_PER_WEEK;
}
