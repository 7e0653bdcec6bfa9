import { describe, expect, it } from 'vitest';

import { LinearProgram, linearSolver } from '../../../models/planning/linear-program';
import { heatRangePerWeek } from '../../../models/planning/heat-range';
import type { Scenario } from '../../../models/scenario/types';
import { smallScenario, WEEK_S } from '../../support/small-scenario';

const range = (change: (scenario: Scenario) => void = () => {}) => {
  const scenario = smallScenario();
  change(scenario);
  return heatRangePerWeek(scenario);
};

describe('the heat that a week can deliver', () => {
  it('week 1, worked by hand: ramps of 8 l/s from 32 and 22 l/s, injection for all of it', () => {
    // Most: P-1 40, P-2 30 (injectors can take 34 + 24 + 20). Least: P-1 24, P-2 14 (injectors at 18 + 8 + 4 = 30 or more).
    const { mostHeatJ, leastHeatJ } = range();
    expect(mostHeatJ[0]! / ((0.04 * 4.6e8 + 0.03 * 4.4e8) * WEEK_S)).toBeCloseTo(1, 6);
    expect(leastHeatJ[0]! / ((0.024 * 4.6e8 + 0.014 * 4.4e8) * WEEK_S)).toBeCloseTo(1, 6);
  });

  it('ends at the bounds', () => {
    const { mostHeatJ } = range();
    expect(mostHeatJ[5]! / ((0.05 * 4.6e8 + 0.05 * 4.4e8) * WEEK_S)).toBeCloseTo(1, 6);
  });

  it('injection that is short keeps production back', () => {
    // In week 1 I-1 and I-3 take at most 34 + 20 l/s: P-1, worth more, gets its 40, P-2 the other 14.
    const { mostHeatJ } = range(({ wells }) => (wells[3]!.outages = [{ fromWeek: 1, toWeek: 1 }]));
    expect(mostHeatJ[0]! / ((0.04 * 4.6e8 + 0.014 * 4.4e8) * WEEK_S)).toBeCloseTo(1, 6);
  });

  it('a week that cannot be balanced delivers nothing', () => {
    const { mostHeatJ, leastHeatJ } = range(({ wells }) => {
      for (const spec of wells) if (spec.kind === 'injector') spec.outages = [{ fromWeek: 2, toWeek: 2 }];
    });
    expect([leastHeatJ[1], mostHeatJ[1]]).toEqual([0, 0]);
    expect(mostHeatJ[0]).toBeGreaterThan(0);
  });

  it('agrees with another solver', async () => {
    const scenario = smallScenario();
    scenario.plan!.lossFraction = 0.04;
    const lp = new LinearProgram(await linearSolver());
    const reach: [number, number][] = [
      [0.01, 0.048],
      [0.006, 0.038],
      [0.01, 0.042],
      [0, 0.032],
      [0, 0.028],
    ];
    const heat = [4.6, 4.4, 0, 0, 0];
    reach.forEach(([low, high], j) => lp.addColumn(-heat[j]!, 100 * low, 100 * high));
    lp.addRow({ lower: 0, upper: 0, indices: [0, 1, 2, 3, 4], values: [-0.96, -0.96, 1, 1, 1] });
    const answer = lp.solve()!;
    lp.dispose();
    expect(heatRangePerWeek(scenario).mostHeatJ[1]! / ((-answer.objective / 100) * 1e8 * WEEK_S)).toBeCloseTo(
      1,
      6,
    );
  });
});
