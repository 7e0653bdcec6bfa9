import type { z } from 'zod';

import type { FieldRow } from '../../../db/store/fields';
import { JOULE_PER } from '../../../models/units';
import type { BodyOf, ReplyOf } from '../../../src/contract/endpoint';
import type { checkTarget } from '../../../src/contract/plans';
import type { Context } from '../../context';
import { checkHorizon } from './request';
import { prepareScenario } from './service';

type Answer = z.output<typeof checkTarget.reply> & ReplyOf<typeof checkTarget>;

/** Relative slack, so that a target typed from the range that was shown counts as met. */
const SLACK = 1e-6;

/** Whether bounds, ramps, outages and balance allow the targets, before anything is computed in earnest. */
export function answerTarget(context: Context, field: FieldRow, body: BodyOf<typeof checkTarget>): Answer {
  const targets = checkHorizon(field, body, context.clock());
  const horizon = { ...body, heatTargetJPerWeek: targets, lookAheadWeeks: 0, objective: 'quietest' } as const;
  const { scenario } = prepareScenario(context, field, horizon);
  const { leastHeatJ, mostHeatJ } = context.model.heatRangePerWeek(scenario);
  const ceilings = targets.map((target) => target * (1 + body.heatBand));
  const shortIn = targets.findIndex((target, week) => target > mostHeatJ[week]! * (1 + SLACK));
  const overIn = ceilings.findIndex((ceiling, week) => ceiling < leastHeatJ[week]! * (1 - SLACK));
  const feasible = shortIn < 0 && overIn < 0;
  let sentence = 'The rates can deliver every target.';
  if (shortIn >= 0) {
    const most = mostHeatJ[shortIn]!;
    sentence = `Week ${shortIn + 1} can deliver at most ${megawattHours(most)} MWh: ${megawattHours(targets[shortIn]! - most)} MWh short of the target.`;
  } else if (overIn >= 0) {
    const least = leastHeatJ[overIn]!;
    sentence = `Week ${overIn + 1} delivers at least ${megawattHours(least)} MWh: ${megawattHours(least - ceilings[overIn]!)} MWh more than the target and its band allow.`;
  }
  return { feasible, mostHeatJ, leastHeatJ, sentence };
}

/** Whole MWh, except that a shortfall never reads as zero. */
function megawattHours(joule: number): string {
  const value = joule / JOULE_PER.MWh;
  return value < 10 ? value.toFixed(1) : Math.round(value).toLocaleString('en-GB');
}
