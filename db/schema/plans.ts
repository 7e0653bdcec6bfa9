import { index, integer, primaryKey, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

import { OBJECTIVES, PLAN_STATES } from '../../src/contract/enums';
import { at, id, jsonText } from './columns';
import { fields, reservoirModelVersions, wells } from './fields';
import { people } from './people';

export const plans = sqliteTable(
  'plans',
  {
    id: id().primaryKey(),
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'restrict' }),
    /** Counts within the field: what people call the plan. */
    number: integer('number').notNull(),
    name: text('name').notNull(),
    notes: text('notes').notNull(),
    state: text('state', { enum: PLAN_STATES }).notNull(),
    builtById: id('built_by_id')
      .notNull()
      .references(() => people.id, { onDelete: 'restrict' }),
    modelVersionId: id('model_version_id')
      .notNull()
      .references(() => reservoirModelVersions.id, { onDelete: 'restrict' }),
    firstWeekStartsAt: at('first_week_starts_at').notNull(),
    weeks: integer('weeks').notNull(),
    lookAheadWeeks: integer('look_ahead_weeks').notNull(),
    objective: text('objective', { enum: OBJECTIVES }).notNull(),
    request: jsonText('request').notNull(),
    /** Everything the result depends on, exactly as it was computed from. */
    scenario: jsonText('scenario').notNull(),
    inputHash: text('input_hash').notNull(),
    /** The target over the plan's own weeks together. */
    heatTargetJ: real('heat_target_j').notNull(),
    createdAt: at('created_at').notNull(),
    /** Null until it has been computed; with it all of the summary below. */
    computedAt: at('computed_at'),
    rateMultiple: real('rate_multiple'),
    heatJ: real('heat_j'),
    gap: real('gap'),
  },
  (table) => [
    uniqueIndex('plans_number').on(table.fieldId, table.number),
    index('plans_input').on(table.inputHash),
  ],
);

/** The rates a plan asks for. */
export const planRates = sqliteTable(
  'plan_rates',
  {
    planId: id('plan_id')
      .notNull()
      .references(() => plans.id, { onDelete: 'restrict' }),
    wellId: id('well_id')
      .notNull()
      .references(() => wells.id, { onDelete: 'restrict' }),
    week: integer('week').notNull(),
    rateM3PerS: real('rate_m3_per_s').notNull(),
  },
  (table) => [primaryKey({ columns: [table.planId, table.wellId, table.week] })],
);

/** What was forecast, week by week, so that a later week can be held against it. */
export const planForecastWeeks = sqliteTable(
  'plan_forecast_weeks',
  {
    planId: id('plan_id')
      .notNull()
      .references(() => plans.id, { onDelete: 'restrict' }),
    week: integer('week').notNull(),
    startsAt: at('starts_at').notNull(),
    lookAhead: integer('look_ahead', { mode: 'boolean' }).notNull(),
    expectedEvents: real('expected_events').notNull(),
    rateMultiple: real('rate_multiple').notNull(),
    heatJ: real('heat_j').notNull(),
  },
  (table) => [primaryKey({ columns: [table.planId, table.week] })],
);

/** The whole answer as the model gave it; apart from the plan so that lists do not read it. */
export const planResults = sqliteTable('plan_results', {
  planId: id('plan_id')
    .primaryKey()
    .references(() => plans.id, { onDelete: 'restrict' }),
  result: jsonText('result').notNull(),
  modelVersion: text('model_version').notNull(),
  createdAt: at('created_at').notNull(),
});
