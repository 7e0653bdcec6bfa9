import { beforeAll, describe, expect, it } from 'vitest';

import { planScenario } from '../../models/scenario/plan-scenario';
import type { PlanResult } from '../../models/scenario/types';
import { presentResult } from '../../server/features/plans/present-result';
import { smallScenario } from '../support/small-scenario';

describe('the chance of an earthquake of M ≥ 2 in a week', () => {
  let result: PlanResult;
  beforeAll(async () => {
    result = await planScenario(smallScenario());
  }, 60_000);

  // 1 − exp(−N·10^(−b(m − Mc))) of a Poisson process with Gutenberg–Richter magnitudes; worked values. Only m − Mc
  // matters, so Mc is set for the shown magnitude of 2: (N, b, m − Mc) = (10, 1, 1), (10, 1, 2), (4.2, 1.2, 1.7).
  it.each([
    [10, 1, 1, 0.6321205588],
    [10, 1, 0, 0.09516258196],
    [4.2, 1.2, 0.3, 0.03758011751],
  ])('%f events, b = %f, complete from M %f', (expectedEvents, bValue, completenessMagnitude, chance) => {
    const scenario = smallScenario();
    Object.assign(scenario.seismicity, { bValue, completenessMagnitude });
    const weeks = result.weeks.map((week) => ({ ...week, expectedEvents }));
    const presented = presentResult(scenario, { ...result, weeks }, 'hash', () => 0);
    expect(presented.chanceMagnitude).toBe(2);
    for (const week of presented.weeks) expect(Math.abs(week.chance / chance - 1)).toBeLessThan(1e-9);
  });

  it('stays exact where it is tiny', () => {
    const scenario = smallScenario();
    Object.assign(scenario.seismicity, { bValue: 1, completenessMagnitude: 0 });
    const weeks = result.weeks.map((week) => ({ ...week, expectedEvents: 1e-16 }));
    const [week] = presentResult(scenario, { ...result, weeks }, 'hash', () => 0).weeks;
    expect(Math.abs(week!.chance / 1e-18 - 1)).toBeLessThan(1e-9);
  });
});
