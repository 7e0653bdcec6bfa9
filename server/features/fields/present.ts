import type { FieldRow, WellRow } from '../../../db/store/fields';
import type { PlanRow } from '../../../db/store/plans';
import type { FieldCard, FieldWeek } from '../../../src/contract/fields';
import type { Role } from '../../../src/contract/enums';

export function presentCard(
  field: FieldRow,
  roles: Role[],
  more: { weekStartsAt: number; newestPlan: PlanRow | undefined; waitsForMe: string | null },
): FieldCard {
  const { id, name, place, timeZone } = field;
  return {
    id,
    name,
    place,
    timeZone,
    roles,
    weekStartsAt: more.weekStartsAt,
    newestPlan: presentNewestPlan(more.newestPlan),
    waitsForMe: more.waitsForMe,
  };
}

function presentNewestPlan(plan: PlanRow | undefined): FieldCard['newestPlan'] {
  if (!plan || plan.rateMultiple === null || plan.heatJ === null) return null;
  const { id, number, state, rateMultiple, heatJ, heatTargetJ } = plan;
  return { id, number, state, rateMultiple, heatJ, heatTargetJ };
}

export function presentWell(
  well: WellRow,
  last: { rateM3PerS: number; weekStartsAt: number } | undefined,
): FieldWeek['wells'][number] {
  const { id, name, kind, control, xM, yM } = well;
  return {
    id,
    name,
    kind,
    control,
    xM,
    yM,
    lastRateM3PerS: last?.rateM3PerS ?? null,
    lastRateAt: last?.weekStartsAt ?? null,
  };
}
