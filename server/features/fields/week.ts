import type { FieldRow } from '../../../db/store/fields';
import { newestOpenJob } from '../../../db/store/jobs';
import { newestComputedPlan, type PlanRow } from '../../../db/store/plans';
import { newestEventAt, newestMeteredWeek } from '../../../db/store/readings';
import type { FieldCard, FieldWeek } from '../../../src/contract/fields';
import type { Role } from '../../../src/contract/enums';
import type { Context } from '../../context';
import { addWeeks, dayInWords } from '../../time/local-week';
import { mayBuildPlan } from '../plans/service';
import { changeSentence } from './change';
import { presentCard, presentWell } from './present';
import { acceptedModel, currentWeekStart, lastRates, pastWeeks, seismicityOf, wellsOf } from './service';
import { loopSteps } from './steps';

export function fieldCard(context: Context, field: FieldRow, roles: Role[]): FieldCard {
  const weekStartsAt = currentWeekStart(context, field);
  const newestPlan = newestComputedPlan(context.database.db, field.id);
  const waitsForMe = waitingSentence(context, field, roles, weekStartsAt, newestPlan);
  return presentCard(field, roles, { weekStartsAt, newestPlan, waitsForMe });
}

export function fieldWeek(context: Context, field: FieldRow, roles: Role[]): FieldWeek {
  const { db } = context.database;
  const model = acceptedModel(context, field.id);
  const seismicity = model ? seismicityOf(model) : null;
  const weekStartsAt = currentWeekStart(context, field);
  const nextWeekStartsAt = addWeeks(weekStartsAt, 1, field.timeZone);
  const rates = lastRates(context, field.id);
  const weeks = pastWeeks(context, field);
  const newestReadingAt = newestMeteredWeek(db, field.id);
  const openJob = newestOpenJob(db, field.id);
  const plan = newestComputedPlan(db, field.id);
  return {
    field: fieldCard(context, field, roles),
    wells: wellsOf(context, field.id).map((well) => presentWell(well, rates.get(well.id))),
    backgroundEventsPerYear: seismicity?.backgroundEventsPerYear ?? 0,
    completenessMagnitude: seismicity?.completenessMagnitude ?? 0,
    pastWeeks: weeks,
    change: changeSentence(weeks),
    newestReadingAt,
    newestEventAt: newestEventAt(db, field.id),
    steps: loopSteps({
      timeZone: field.timeZone,
      weekStartsAt,
      nextWeekStartsAt,
      lastCompleteWeekAt: addWeeks(weekStartsAt, -1, field.timeZone),
      newestReadingAt,
      model: model ? { number: model.number } : null,
      plan: plan && covers(plan, nextWeekStartsAt, field.timeZone) ? { number: plan.number } : null,
      jobOpen: openJob !== undefined,
    }),
    runningJobId: openJob?.id ?? null,
    can: { buildPlan: mayBuildPlan({ roles }).allowed },
  };
}

function covers(plan: PlanRow, weekStartsAt: number, timeZone: string): boolean {
  const endsAt = addWeeks(plan.firstWeekStartsAt, plan.weeks, timeZone);
  return plan.firstWeekStartsAt <= weekStartsAt && weekStartsAt < endsAt;
}

function waitingSentence(
  context: Context,
  field: FieldRow,
  roles: Role[],
  weekStartsAt: number,
  plan: PlanRow | undefined,
): string | null {
  if (!mayBuildPlan({ roles }).allowed || newestOpenJob(context.database.db, field.id)) return null;
  const nextWeek = addWeeks(weekStartsAt, 1, field.timeZone);
  if (plan && covers(plan, nextWeek, field.timeZone)) return null;
  return `Build the plan for the week of ${dayInWords(nextWeek, field.timeZone)}.`;
}
