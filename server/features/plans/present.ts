import type { JobRow } from '../../../db/store/jobs';
import type { PlanRow, PlanWithBuilder } from '../../../db/store/plans';
import type { PlanSummary } from '../../../src/contract/plans';

export function presentSummary({ plan, builtBy }: PlanWithBuilder, job: JobRow | undefined): PlanSummary {
  const { id, number, name, state, createdAt, firstWeekStartsAt, weeks } = plan;
  return {
    id,
    number,
    name,
    state,
    builtBy,
    createdAt,
    firstWeekStartsAt,
    weeks,
    jobId: job?.id ?? null,
    jobState: job?.state ?? null,
    outcome: presentOutcome(plan),
  };
}

function presentOutcome({ rateMultiple, heatJ, heatTargetJ, gap }: PlanRow): PlanSummary['outcome'] {
  if (rateMultiple === null || heatJ === null || gap === null) return null;
  return { rateMultiple, heatJ, heatTargetJ, gap };
}
