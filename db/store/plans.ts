import { and, desc, eq, isNotNull, isNull, max, ne } from 'drizzle-orm';

import type { PlanState } from '../../src/contract/enums';
import type { Db } from '../client';
import { people } from '../schema/people';
import { planForecastWeeks, planRates, planResults, plans } from '../schema/plans';

export type PlanRow = typeof plans.$inferSelect;
export interface PlanWithBuilder {
  plan: PlanRow;
  builtBy: { id: string; name: string };
}

const builder = { id: people.id, name: people.name };

export function nextPlanNumber(db: Db, fieldId: string): number {
  const row = db
    .select({ highest: max(plans.number) })
    .from(plans)
    .where(eq(plans.fieldId, fieldId))
    .get();
  return (row?.highest ?? 0) + 1;
}

export function insertPlan(db: Db, plan: typeof plans.$inferInsert): void {
  db.insert(plans).values(plan).run();
}

export function findPlan(db: Db, fieldId: string, planId: string): PlanWithBuilder | undefined {
  return db
    .select({ plan: plans, builtBy: builder })
    .from(plans)
    .innerJoin(people, eq(people.id, plans.builtById))
    .where(and(eq(plans.fieldId, fieldId), eq(plans.id, planId)))
    .get();
}

export function findPlanScenario(db: Db, planId: string): string | undefined {
  return db.select({ scenario: plans.scenario }).from(plans).where(eq(plans.id, planId)).get()?.scenario;
}

export function listPlans(db: Db, fieldId: string): PlanWithBuilder[] {
  return db
    .select({ plan: plans, builtBy: builder })
    .from(plans)
    .innerJoin(people, eq(people.id, plans.builtById))
    .where(eq(plans.fieldId, fieldId))
    .orderBy(desc(plans.number))
    .all();
}

/** The newest plan with a result that has not been taken back. */
export function newestComputedPlan(db: Db, fieldId: string): PlanRow | undefined {
  return db
    .select()
    .from(plans)
    .where(and(eq(plans.fieldId, fieldId), isNotNull(plans.computedAt), ne(plans.state, 'withdrawn')))
    .orderBy(desc(plans.number))
    .limit(1)
    .get();
}

/** Moves a plan on only if it is still where the caller saw it; false: somebody was faster. */
export function movePlan(db: Db, planId: string, from: PlanState, to: PlanState): boolean {
  const moved = db
    .update(plans)
    .set({ state: to })
    .where(and(eq(plans.id, planId), eq(plans.state, from)))
    .run();
  return moved.changes === 1;
}

/** Records what was computed, once: a plan that has a result keeps it. */
export function setPlanSummary(
  db: Db,
  planId: string,
  summary: { computedAt: number; rateMultiple: number; heatJ: number; gap: number },
): boolean {
  const written = db
    .update(plans)
    .set(summary)
    .where(and(eq(plans.id, planId), isNull(plans.computedAt)))
    .run();
  return written.changes === 1;
}

export function insertPlanResult(
  db: Db,
  result: typeof planResults.$inferInsert,
  rates: (typeof planRates.$inferInsert)[],
  weeks: (typeof planForecastWeeks.$inferInsert)[],
): void {
  db.insert(planResults).values(result).run();
  for (const rate of rates) db.insert(planRates).values(rate).run();
  for (const week of weeks) db.insert(planForecastWeeks).values(week).run();
}

export function findPlanResult(db: Db, planId: string): typeof planResults.$inferSelect | undefined {
  return db.select().from(planResults).where(eq(planResults.planId, planId)).get();
}
