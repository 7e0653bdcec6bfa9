import type { PlanResult, Scenario } from '../../models/scenario/types';

export interface Violations {
  bounds: number;
  ramps: number;
  heat: number;
  balance: number;
  pressure: number;
}

/**
 * How far a plan passes its limits, worked out from the scenario and the reported numbers alone, relative to each
 * limit (pressures relative to 1 bar).
 */
export function planViolations(scenario: Scenario, result: PlanResult): Violations {
  const plan = scenario.plan!;
  const worst: Violations = { bounds: 0, ramps: 0, heat: 0, balance: 0, pressure: 0 };
  const note = (kind: keyof Violations, amount: number) => (worst[kind] = Math.max(worst[kind], amount));
  const weekly = (list: number[], week: number) =>
    list.length === 0 ? null : list[Math.min(week, list.length - 1)];
  const rateOf = new Map(result.rates.map((entry) => [entry.well, entry.weeklyM3PerS]));
  const isOut = (name: string, week: number) =>
    scenario.wells
      .find((entry) => entry.name === name)!
      .outages.some(({ fromWeek, toWeek }) => week + 1 >= fromWeek && week + 1 <= toWeek);

  for (const spec of scenario.wells) {
    const rates = rateOf.get(spec.name)!;
    const last = scenario.history.find((entry) => entry.well === spec.name)?.steps.at(-1)?.rateM3PerS ?? 0;
    rates.forEach((rate, week) => {
      if (isOut(spec.name, week)) return note('bounds', rate / 0.01);
      if (!spec.control) return note('bounds', Math.abs(rate - last) / 0.01);
      note('bounds', (spec.minRateM3PerS - rate) / 0.01);
      if (spec.maxRateM3PerS !== null) note('bounds', (rate - spec.maxRateM3PerS) / 0.01);
      if (spec.maxChangeM3PerSPerWeek === null || (week > 0 && isOut(spec.name, week - 1))) return;
      const before = week === 0 ? last : rates[week - 1];
      note('ramps', (Math.abs(rate - before) - spec.maxChangeM3PerSPerWeek) / 0.01);
    });
  }
  for (let week = 0; week < plan.weeks; week++) {
    let heat = 0;
    let injected = 0;
    let produced = 0;
    for (const spec of scenario.wells) {
      const rate = rateOf.get(spec.name)![week];
      if (spec.kind === 'injector') injected += rate;
      else {
        produced += rate;
        heat += rate * spec.heatJPerM3 * 604_800;
      }
    }
    const target = weekly(plan.heatTargetJPerWeek, week);
    const ceiling = weekly(plan.heatCeilingJPerWeek, week);
    if (target !== null) note('heat', 1 - heat / target);
    if (ceiling !== null) note('heat', heat / ceiling - 1);
    note('balance', Math.abs(injected - (1 - plan.lossFraction) * produced) / 0.01);
    for (const { name, bottomHoleMinPa, bottomHoleMaxPa } of result.weeks[week].wells) {
      const spec = scenario.wells.find((entry) => entry.name === name)!;
      if (spec.maxPressurePa !== null) note('pressure', (bottomHoleMaxPa - spec.maxPressurePa) / 1e5);
      if (spec.minPressurePa !== null) note('pressure', (spec.minPressurePa - bottomHoleMinPa) / 1e5);
    }
  }
  return worst;
}
