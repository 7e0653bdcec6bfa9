/**
 * The least and the most heat that each week's rates can deliver: an answer while somebody types.
 *
 *   max (min) Σ_producers heat_j q_j  subject to bounds, outages, the reach of the ramps from the last measured
 *   rate, and the balance, each week by itself
 *
 * Method    One small linear program a week (simplex of javascript-lp-solver); every answer is checked against
 *           its own rows before it is believed.
 * Units     J per week
 * Limits    Weeks are looked at one by one and pressures not at all: a target beyond this range cannot be met, one
 *           inside it need not be possible. A week whose balance cannot be kept delivers nothing (0, 0).
 */
import solver from 'javascript-lp-solver';

import { SECONDS_PER_WEEK } from '../constants';
import { NumericalError } from '../errors';
import type { Scenario, WellSpec } from '../scenario/types';

export interface HeatRange {
  leastHeatJ: number[];
  mostHeatJ: number[];
}

/** Rates in the programs are in l/s, to keep the solver's fixed tolerances small beside them. */
const RATE_UNIT = 1e-3;
/** Heat in the programs is in TJ a week. */
const HEAT_UNIT = 1e12;
/** l/s; what an answer may miss its rows by. */
const TOLERANCE = 1e-5;

interface Reach {
  spec: WellSpec;
  low: number;
  high: number;
}

/** @throws NumericalError where the solver's answer does not keep its own limits */
export function heatRangePerWeek(scenario: Scenario): HeatRange {
  const { plan } = scenario;
  const range: HeatRange = { leastHeatJ: [], mostHeatJ: [] };
  if (!plan) return range;
  for (let week = 0; week < plan.weeks; week++) {
    const reach = reachOf(scenario, week);
    range.leastHeatJ.push(heatOf(reach, plan.lossFraction, 'min') * HEAT_UNIT);
    range.mostHeatJ.push(heatOf(reach, plan.lossFraction, 'max') * HEAT_UNIT);
  }
  return range;
}

/** What each well can run at in a week (0-based), l/s. */
function reachOf(scenario: Scenario, week: number): Reach[] {
  // A well without a maximum moves no more than all others together could take or give.
  const known = scenario.wells.reduce((sum, spec) => sum + (spec.maxRateM3PerS ?? 0), 0);
  return scenario.wells.map((spec) => {
    const steps = scenario.history.find((entry) => entry.well === spec.name)?.steps ?? [];
    const last = steps.at(-1)?.rateM3PerS ?? 0;
    const isOut = (at: number) =>
      spec.outages.some(({ fromWeek, toWeek }) => at + 1 >= fromWeek && at + 1 <= toWeek);
    const at = (low: number, high: number): Reach => ({ spec, low: low / RATE_UNIT, high: high / RATE_UNIT });
    if (isOut(week)) return at(0, 0);
    if (!spec.control) {
      const given = scenario.rates.find((entry) => entry.well === spec.name)?.weeklyM3PerS;
      const rate = given ? given[Math.min(week, given.length - 1)] : last;
      return at(rate, rate);
    }
    const most = spec.maxRateM3PerS ?? Math.max(10, 10 * known);
    // After an outage a well may start anywhere inside its bounds.
    const isFree =
      spec.maxChangeM3PerSPerWeek === null || Array.from({ length: week }, (_, k) => k).some(isOut);
    const change = isFree ? Infinity : (week + 1) * (spec.maxChangeM3PerSPerWeek ?? 0);
    return at(Math.max(spec.minRateM3PerS, last - change), Math.min(most, last + change));
  });
}

/** TJ; 0 where the week cannot be balanced. */
function heatOf(reach: readonly Reach[], lossFraction: number, direction: 'min' | 'max'): number {
  if (reach.some(({ low, high }) => low > high + TOLERANCE)) return 0;
  const share = ({ kind }: WellSpec) => (kind === 'injector' ? 1 : -(1 - lossFraction));
  const heatPer = ({ kind, heatJPerM3 }: WellSpec) =>
    kind === 'producer' ? (heatJPerM3 * RATE_UNIT * SECONDS_PER_WEEK) / HEAT_UNIT : 0;
  // Variables are what runs above each well's least rate, since the solver's variables start at 0.
  const balanceAtLow = reach.reduce((sum, { spec, low }) => sum + share(spec) * low, 0);
  const heatAtLow = reach.reduce((sum, { spec, low }) => sum + heatPer(spec) * low, 0);
  const answer = solver.Solve({
    optimize: 'heat',
    opType: direction,
    constraints: {
      balance: { equal: -balanceAtLow },
      ...Object.fromEntries(reach.map(({ low, high }, j) => [`most${j}`, { max: Math.max(0, high - low) }])),
    },
    variables: Object.fromEntries(
      reach.map(({ spec }, j) => [
        `rate${j}`,
        { heat: heatPer(spec), balance: share(spec), [`most${j}`]: 1 },
      ]),
    ),
  }) as { feasible: boolean } & Record<string, number | boolean | undefined>;
  if (!answer.feasible) return 0;

  let balance = balanceAtLow;
  let heat = heatAtLow;
  reach.forEach(({ spec, low, high }, j) => {
    const above = Number(answer[`rate${j}`] ?? 0);
    if (!(above >= -TOLERANCE && above <= high - low + TOLERANCE)) {
      throw new NumericalError('the one-week program returned a rate outside its bounds', {
        well: spec.name,
        above,
      });
    }
    balance += share(spec) * above;
    heat += heatPer(spec) * above;
  });
  if (!(Math.abs(balance) <= TOLERANCE * (1 + reach.length))) {
    throw new NumericalError('the one-week program returned rates that do not balance', { balance });
  }
  return heat;
}
