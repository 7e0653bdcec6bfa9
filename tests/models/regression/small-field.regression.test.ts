import { describe, expect, it } from 'vitest';

import { planScenario } from '../../../models/scenario/plan-scenario';
import { MODEL_VERSION } from '../../../models/version';
import { smallScenario } from '../../support/small-scenario';

/**
 * Guards change and proves no truth: when these numbers move on purpose, MODEL_VERSION rises with them, since
 * stored results of the old version can no longer be replayed.
 */
const RECORDED = { modelVersion: '1.0.0', expectedEvents: 8.046592, holdEvents: 11.53698, week1: 0.8725192 };

describe('the small field', () => {
  it('is planned as when these numbers were recorded', async () => {
    const { expectedEvents, comparison, weeks } = await planScenario(smallScenario());
    expect({
      modelVersion: MODEL_VERSION,
      expectedEvents: Number(expectedEvents.toPrecision(7)),
      holdEvents: Number(comparison.hold.expectedEvents.toPrecision(7)),
      week1: Number(weeks[0]!.expectedEvents.toPrecision(7)),
    }).toEqual(RECORDED);
  });
});
