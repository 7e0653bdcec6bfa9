import { randomUUID } from 'node:crypto';

import { recordAudit } from '../../../db/store/audit';
import type { FieldRow, ModelVersionRow } from '../../../db/store/fields';
import { findJobOfPlan, findReusableJob, insertJob } from '../../../db/store/jobs';
import {
  findPlan,
  insertPlan,
  movePlan,
  nextPlanNumber,
  type PlanWithBuilder,
} from '../../../db/store/plans';
import { newestMeteredWeek } from '../../../db/store/readings';
import { ScenarioError } from '../../../models/errors';
import type { Scenario } from '../../../models/scenario/types';
import { MODEL_VERSION } from '../../../models/version';
import type { PlanRequest } from '../../../src/contract/plans';
import { canonicalJson, inputHash } from '../../canonical-json';
import type { Context } from '../../context';
import { badRequest, conflict, notFound } from '../../errors';
import type { Actor } from '../../http/session';
import { takeOverResult } from '../../jobs/record-plan';
import { acceptedModel } from '../fields/service';
import { assembleScenario, type HorizonRequest } from './assemble-scenario';
import { checkHorizon } from './request';

export { mayBuildPlan } from './policy';

export function requirePlan(context: Context, fieldId: string, planId: string): PlanWithBuilder {
  const found = findPlan(context.database.db, fieldId, planId);
  if (!found) throw notFound('The plan');
  return found;
}

/** What a plan is computed from, read out of the database and checked by the model's own reader. */
export function prepareScenario(
  context: Context,
  field: FieldRow,
  request: HorizonRequest,
): { scenario: Scenario; model: ModelVersionRow } {
  const { db } = context.database;
  const model = acceptedModel(context, field.id);
  if (!model) throw conflict('NO_MODEL', 'No model of the ground has been accepted for this field.');
  if (newestMeteredWeek(db, field.id) === null) {
    throw conflict('NO_READINGS', 'No rates have been metered: a plan has nothing to start from.');
  }
  try {
    return { model, scenario: context.model.readScenario(assembleScenario(db, field, model, request)) };
  } catch (error) {
    if (!(error instanceof ScenarioError)) throw error;
    throw badRequest('The field as it is set up cannot be planned for.', error.issues);
  }
}

/**
 * Writes down the plan, its job and who asked for it, all or nothing, then hands the job to the queue.
 * Where the same input was computed before with the same model, the job is born done.
 */
export function requestPlan(context: Context, field: FieldRow, actor: Actor, asked: PlanRequest) {
  const heatTargetJPerWeek = checkHorizon(field, asked, context.clock());
  const request: PlanRequest = { ...asked, heatTargetJPerWeek };
  const { scenario, model } = prepareScenario(context, field, request);
  const planId = randomUUID();
  const jobId = randomUUID();
  const hash = inputHash(scenario);
  const createdAt = context.clock();

  context.database.db.transaction(
    (db) => {
      const number = nextPlanNumber(db, field.id);
      insertPlan(db, {
        id: planId,
        fieldId: field.id,
        number,
        name: request.name,
        notes: request.notes,
        state: 'draft',
        builtById: actor.id,
        modelVersionId: model.id,
        firstWeekStartsAt: request.firstWeekStartsAt,
        weeks: request.weeks,
        lookAheadWeeks: request.lookAheadWeeks,
        objective: request.objective,
        request: JSON.stringify(request),
        scenario: canonicalJson(scenario),
        inputHash: hash,
        heatTargetJ: heatTargetJPerWeek.reduce((sum, target) => sum + target, 0),
        createdAt,
      });
      insertJob(db, {
        id: jobId,
        fieldId: field.id,
        kind: 'plan.build',
        planId,
        requestedById: actor.id,
        state: 'queued',
        step: 'Waiting for its turn',
        inputHash: hash,
        modelVersion: MODEL_VERSION,
        createdAt,
      });
      recordAudit(db, {
        happenedAt: createdAt,
        fieldId: field.id,
        personId: actor.id,
        event: 'planRequested',
        subjectId: planId,
        details: { number, jobId, inputHash: hash },
      });
      const earlier = findReusableJob(db, hash, MODEL_VERSION);
      if (earlier) takeOverResult(db, jobId, earlier, createdAt);
    },
    { behavior: 'immediate' },
  );
  context.jobs.enqueue(jobId);
  return { planId, jobId };
}

/** Draft → withdrawn. Exactly one of two that try at the same moment succeeds. */
export function withdrawPlan(context: Context, actor: Actor, { plan }: PlanWithBuilder): void {
  context.database.db.transaction(
    (db) => {
      const jobState = findJobOfPlan(db, plan.id)?.state;
      if (jobState === 'queued' || jobState === 'running') {
        throw conflict('PLAN_NOT_DRAFT', 'The plan is still being computed: stop the job first.');
      }
      if (!movePlan(db, plan.id, 'draft', 'withdrawn')) {
        throw conflict('PLAN_NOT_DRAFT', 'Only a draft can be withdrawn, and this plan is not one any more.');
      }
      recordAudit(db, {
        happenedAt: context.clock(),
        fieldId: plan.fieldId,
        personId: actor.id,
        event: 'planWithdrawn',
        subjectId: plan.id,
        details: { number: plan.number },
      });
    },
    { behavior: 'immediate' },
  );
}
