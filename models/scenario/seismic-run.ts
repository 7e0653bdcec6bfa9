/**
 * The seismicity of a field model over its history and over any future rates.
 *
 * The history is run once; each set of future rates then costs one pass over the cells.
 */
import { SECONDS_PER_DAY, SECONDS_PER_WEEK } from '../constants';
import { amplitudesAt, type RateStep } from '../diffusion/amplitudes';
import { buildFieldBasis, type FieldBasis } from '../diffusion/field-basis';
import { stepFactor } from '../diffusion/response-library';
import { countEvents, type CountResult } from '../seismicity/field-count';
import { buildPanels, panelRuleFor, type PanelRule, type TimePanels } from '../seismicity/time-panels';
import type { FieldModel } from './field-model';

/** Stands for the maximum of a well that has none, m³/s: a strong geothermal well. */
const UNSTATED_RATE = 0.1;

export interface SeismicRun {
  model: FieldModel;
  basis: FieldBasis;
  /** One panel a week, or longer ones in the look-ahead (`withLongLookAhead`). */
  panels: TimePanels;
  rule: PanelRule;
  /** ln R of each cell of the background at the plan's start. */
  logRateStart: Float64Array;
}

/**
 * @param changed whether any rate may change at the start of each week
 */
export function prepareSeismicRun(
  model: FieldModel,
  changed: readonly boolean[],
  rule: PanelRule = panelRuleFor(largestWeeklyStressChange(model)),
): SeismicRun {
  const logRateStart = runHistory(model, rule);
  const edgesS = Array.from({ length: model.totalWeeks + 1 }, (_, week) => week * SECONDS_PER_WEEK);
  const panels = buildPanels(edgesS, changed, rule);
  const { blockStart, cells } = model.background;
  const largest = largestAhead(model, edgesS[edgesS.length - 1]);
  const basis = buildFieldBasis(model.library.wells, cells, blockStart, largest);
  return { model, basis, panels, rule, logRateStart };
}

/**
 * The same with ever longer panels (1, 1, 2, 4, 8 … weeks) after the plan's weeks, where nothing changes any more:
 * for a search, which needs the sum of all weeks only.
 */
export function withLongLookAhead(run: SeismicRun, planWeeks: number): SeismicRun {
  const edgesS: number[] = [];
  for (let week = 0; week < planWeeks; week++) edgesS.push(week * SECONDS_PER_WEEK);
  for (let week = planWeeks, length = 1; week < run.model.totalWeeks;) {
    edgesS.push(week * SECONDS_PER_WEEK);
    week += length;
    if (week > planWeeks + 1) length *= 2;
  }
  const changed = edgesS.map((_, index) => index < planWeeks);
  edgesS.push(run.model.totalWeeks * SECONDS_PER_WEEK);
  const { nodes, pieces } = run.rule.smooth;
  const rule = { ...run.rule, smooth: { nodes: nodes + 1, pieces: 3 * pieces } };
  return { ...run, panels: buildPanels(edgesS, changed, rule) };
}

/** Signed steps of every well: history, then the weekly magnitudes from week 0 on. */
export function stepsWith(model: FieldModel, weeklyM3PerS: readonly ArrayLike<number>[]): RateStep[][] {
  return model.wells.map((well, j) => {
    const weekly = weeklyM3PerS[j];
    const future: RateStep[] = [];
    for (let week = 0; week < weekly.length; week++) {
      future.push({ fromS: week * SECONDS_PER_WEEK, rateM3PerS: well.sign * weekly[week] });
    }
    return [...well.history.filter((step) => step.fromS < 0), ...future];
  });
}

/**
 * Expected events for future weekly rates (magnitudes; a list shorter than the weeks is held at its last).
 *
 * @param gradientEnds for each wanted gradient, how many panels it counts
 */
export function runForward(
  run: SeismicRun,
  weeklyM3PerS: readonly ArrayLike<number>[],
  gradientEnds: readonly number[] = [],
): CountResult {
  const { model, basis, panels, logRateStart } = run;
  const steps = stepsWith(model, weeklyM3PerS);
  return countEvents({
    basis,
    background: model.background,
    panels,
    coefficients: coefficientsOf(model, basis, steps, panels.nodeTimeS),
    relaxationS: model.rateState.relaxationS,
    logRateStart,
    gradientEnds,
  });
}

/**
 * Gradient by the weekly magnitudes of each well from the gradient by the field's coefficients (adjoint of
 * `amplitudesAt`).
 *
 * @returns per well a Float64Array(weeks); the last week carries the look-ahead in which it is held
 */
export function gradientByRates(
  run: SeismicRun,
  byCoefficients: Float64Array,
  weeks: number,
): Float64Array[] {
  const { model, basis, panels } = run;
  const { nodeTimeS } = panels;
  return model.wells.map((well, j) => {
    const response = model.library.wells[j];
    const offset = basis.offsets[j];
    const gradient = new Float64Array(weeks);
    for (let k = 0; k < response.count; k++) {
      let adjoint = 0;
      for (let node = nodeTimeS.length - 1; node > 0; node--) {
        adjoint += byCoefficients[node * basis.width + offset + k];
        const lengthS = nodeTimeS[node] - nodeTimeS[node - 1];
        const middleS = nodeTimeS[node - 1] + lengthS / 2;
        const week = Math.min(weeks - 1, Math.floor(middleS / SECONDS_PER_WEEK));
        const decay = response.decayPerS[k];
        gradient[week] += adjoint * response.input[k] * stepFactor(decay, lengthS);
        adjoint *= Math.exp(-decay * lengthS);
      }
    }
    const scale = well.sign * model.rateState.stressPerPa;
    for (let week = 0; week < weeks; week++) gradient[week] *= scale;
    return gradient;
  });
}

function coefficientsOf(
  model: FieldModel,
  basis: FieldBasis,
  steps: readonly RateStep[][],
  timesS: Float64Array,
): Float64Array {
  const coefficients = new Float64Array(timesS.length * basis.width);
  model.library.wells.forEach((response, j) => {
    const rows = amplitudesAt(response, steps[j], timesS);
    for (let time = 0; time < timesS.length; time++) {
      const to = time * basis.width + basis.offsets[j];
      for (let k = 0; k < response.count; k++) {
        coefficients[to + k] = model.rateState.stressPerPa * rows[time * response.count + k];
      }
    }
  });
  return coefficients;
}

function runHistory(model: FieldModel, rule: PanelRule): Float64Array {
  const { cells, blockStart } = model.background;
  if (model.historyStartS >= 0) return new Float64Array(cells.length);
  const panels = historyPanels(model, rule);
  const steps = model.wells.map((well) => well.history.filter((step) => step.fromS < 0));
  const largest = model.library.wells.map((response, j) => {
    const rows = amplitudesAt(response, steps[j], panels.nodeTimeS);
    const most = new Float64Array(response.count);
    rows.forEach((value, at) => {
      const k = at % response.count;
      most[k] = Math.max(most[k], model.rateState.stressPerPa * Math.abs(value));
    });
    return most;
  });
  const basis = buildFieldBasis(model.library.wells, cells, blockStart, largest);
  return countEvents({
    basis,
    background: model.background,
    panels,
    coefficients: coefficientsOf(model, basis, steps, panels.nodeTimeS),
    relaxationS: model.rateState.relaxationS,
    logRateStart: null,
    gradientEnds: [],
  }).logRateEnd;
}

/** Panels over the history: cut at every change, then ever longer ones while nothing changes. */
function historyPanels(model: FieldModel, rule: PanelRule): TimePanels {
  const changes = new Set<number>();
  for (const well of model.wells)
    for (const step of well.history) if (step.fromS < 0) changes.add(step.fromS);
  const sorted = [...changes].sort((a, b) => a - b);
  const edgesS: number[] = [];
  const changed: boolean[] = [];
  sorted.forEach((fromS, index) => {
    const untilS = sorted[index + 1] ?? 0;
    let lengthS = Math.min(7 * SECONDS_PER_DAY, untilS - fromS);
    let atS = fromS;
    for (let isChange = true; atS < untilS; isChange = false) {
      // A rest shorter than half a panel is joined to it.
      if (untilS - atS < 1.5 * lengthS) lengthS = untilS - atS;
      edgesS.push(atS);
      changed.push(isChange);
      atS += lengthS;
      if (!isChange) lengthS *= 2;
    }
  });
  edgesS.push(0);
  return buildPanels(edgesS, changed, rule);
}

/** The largest coefficient of each mode in any plan: what is left of the history, and the highest rate to the end. */
function largestAhead(model: FieldModel, endS: number): Float64Array[] {
  return model.wells.map((well, j) => {
    const response = model.library.wells[j];
    const rate = largestRateM3PerS(model, j);
    const start = amplitudesAt(response, well.history, [0]);
    return Float64Array.from({ length: response.count }, (_, k) => {
      const driven = Math.abs(response.input[k]) * stepFactor(response.decayPerS[k], endS) * rate;
      return model.rateState.stressPerPa * (Math.abs(start[k]) + driven);
    });
  });
}

/** The highest rate that a well has had, may have or is given, m³/s. */
function largestRateM3PerS({ wells, scenario }: FieldModel, j: number): number {
  const { spec, history } = wells[j];
  const given = scenario.rates.find((entry) => entry.well === spec.name)?.weeklyM3PerS ?? [];
  const past = history.map((step) => Math.abs(step.rateM3PerS));
  return Math.max(spec.maxRateM3PerS ?? UNSTATED_RATE, ...past, ...given);
}

/** What the strongest well does to its own cell within a week, in units of aσ. */
function largestWeeklyStressChange(model: FieldModel): number {
  const { library, wells, rateState } = model;
  return wells.reduce((most, { cell }, j) => {
    const response = library.wells[j];
    let unit = 0;
    for (let k = 0; k < response.count; k++) {
      const amplitude = response.input[k] * stepFactor(response.decayPerS[k], SECONDS_PER_WEEK);
      unit += response.modes[cell * response.count + k] * amplitude;
    }
    return Math.max(most, rateState.stressPerPa * unit * largestRateM3PerS(model, j));
  }, 0);
}
