import { index, integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';

import { JOB_KINDS, JOB_STATES } from '../../src/contract/enums';
import { at, id, jsonText } from './columns';
import { fields } from './fields';
import { people } from './people';
import { plans } from './plans';

/** The truth about what runs; the queue inside the process only orders it. */
export const jobs = sqliteTable(
  'jobs',
  {
    id: id().primaryKey(),
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'restrict' }),
    kind: text('kind', { enum: JOB_KINDS }).notNull(),
    planId: id('plan_id').references(() => plans.id, { onDelete: 'restrict' }),
    requestedById: id('requested_by_id')
      .notNull()
      .references(() => people.id, { onDelete: 'restrict' }),
    state: text('state', { enum: JOB_STATES }).notNull(),
    /** Rises with every change: the identifier of a server-sent event. */
    revision: integer('revision').notNull().default(1),
    progress: real('progress').notNull().default(0),
    step: text('step').notNull(),
    secondsLeft: real('seconds_left'),
    failureCode: text('failure_code'),
    failureMessage: text('failure_message'),
    failureDetails: jsonText('failure_details'),
    attempts: integer('attempts').notNull().default(0),
    inputHash: text('input_hash').notNull(),
    modelVersion: text('model_version').notNull(),
    /** The earlier job whose result was taken over; such a job computed nothing itself. */
    reusedFromId: id('reused_from_id'),
    heartbeatAt: at('heartbeat_at'),
    createdAt: at('created_at').notNull(),
    startedAt: at('started_at'),
    finishedAt: at('finished_at'),
  },
  (table) => [
    index('jobs_field').on(table.fieldId, table.createdAt),
    index('jobs_state').on(table.state),
    index('jobs_input').on(table.inputHash, table.modelVersion),
    index('jobs_plan').on(table.planId),
  ],
);
