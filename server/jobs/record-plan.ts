import type { Db } from '../../db/client';
import { recordAudit } from '../../db/store/audit';
import { findField, listWells } from '../../db/store/fields';
import { findJob, moveJob, type JobRow } from '../../db/store/jobs';
import {
  findPlan,
  findPlanResult,
  insertPlanResult,
  setPlanSummary,
  type PlanRow,
} from '../../db/store/plans';
import type { PlanResult } from '../../models/scenario/types';
import { addWeeks } from '../time/local-week';
import { planWeekTotals } from './plan-week-totals';

/**
 * Writes a result down and ends its job, inside the caller's transaction: either the job was still running
 * and everything is there, or it was not and nothing is (false).
 */
export function recordPlanResult(db: Db, jobId: string, result: PlanResult, finishedAt: number): boolean {
  const ended = moveJob(db, jobId, 'running', 'done', {
    progress: 1,
    step: 'Done',
    secondsLeft: 0,
    finishedAt,
    heartbeatAt: finishedAt,
  });
  if (ended) writeResult(db, planOf(db, jobId), result, finishedAt);
  return ended;
}

/** Ends a waiting job at once with what an earlier one found for the same input. */
export function takeOverResult(db: Db, jobId: string, earlier: JobRow, at: number): boolean {
  const stored = earlier.planId ? findPlanResult(db, earlier.planId) : undefined;
  if (!stored) return false;
  const ended = moveJob(db, jobId, 'queued', 'done', {
    progress: 1,
    step: 'Taken from an earlier run with the same input',
    secondsLeft: 0,
    startedAt: at,
    finishedAt: at,
    reusedFromId: earlier.id,
  });
  if (ended) writeResult(db, planOf(db, jobId), JSON.parse(stored.result), at);
  return ended;
}

function planOf(db: Db, jobId: string): PlanRow {
  const job = findJob(db, jobId)?.job;
  const plan = job?.planId ? findPlan(db, job.fieldId, job.planId)?.plan : undefined;
  if (!plan) throw new Error(`job ${jobId} has no plan`);
  return plan;
}

function writeResult(db: Db, plan: PlanRow, result: PlanResult, at: number): void {
  const timeZone = findField(db, plan.fieldId)!.timeZone;
  const wellIds = new Map(listWells(db, plan.fieldId).map((well) => [well.name, well.id]));
  const { rateMultiple, heatJ } = planWeekTotals(result, plan.weeks);
  if (!setPlanSummary(db, plan.id, { computedAt: at, rateMultiple, heatJ, gap: result.gap })) {
    throw new Error(`plan ${plan.id} has a result already`);
  }
  insertPlanResult(
    db,
    {
      planId: plan.id,
      result: JSON.stringify(result),
      modelVersion: result.modelVersion,
      createdAt: at,
    },
    result.rates.flatMap(({ well, weeklyM3PerS }) =>
      weeklyM3PerS.map((rateM3PerS, index) => ({
        planId: plan.id,
        wellId: wellIds.get(well)!,
        week: index + 1,
        rateM3PerS,
      })),
    ),
    result.weeks.map((week) => ({
      planId: plan.id,
      week: week.week,
      startsAt: addWeeks(plan.firstWeekStartsAt, week.week - 1, timeZone),
      lookAhead: week.week > plan.weeks,
      expectedEvents: week.expectedEvents,
      rateMultiple: week.rateMultiple,
      heatJ: week.heatJ,
    })),
  );
  recordAudit(db, {
    happenedAt: at,
    fieldId: plan.fieldId,
    personId: null,
    event: 'planComputed',
    subjectId: plan.id,
    details: { number: plan.number, gap: result.gap, modelVersion: result.modelVersion },
  });
}
