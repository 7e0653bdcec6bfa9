import { sql } from 'drizzle-orm';
import {
  check,
  index,
  integer,
  primaryKey,
  real,
  sqliteTable,
  text,
  uniqueIndex,
} from 'drizzle-orm/sqlite-core';

import { ROLES, WELL_KINDS } from '../../src/contract/enums';
import { at, id, jsonText } from './columns';
import { people } from './people';

export const fields = sqliteTable('fields', {
  id: id().primaryKey(),
  name: text('name').notNull().unique(),
  place: text('place').notNull(),
  /** IANA zone of the site; its weeks start on the local Monday 00:00. */
  timeZone: text('time_zone').notNull(),
  /** The weekly rate multiple that the operator works to. */
  rateMultipleLimit: real('rate_multiple_limit').notNull(),
  /** Share of the produced volume that is not put back. */
  lossFraction: real('loss_fraction').notNull().default(0),
  /** The smallest step a set-point can be given in; null: any. */
  setPointStepM3PerS: real('set_point_step_m3_per_s'),
  createdAt: at('created_at').notNull(),
});

export const memberships = sqliteTable(
  'memberships',
  {
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'cascade' }),
    personId: id('person_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    role: text('role', { enum: ROLES }).notNull(),
    createdAt: at('created_at').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.fieldId, table.personId, table.role] }),
    index('memberships_person').on(table.personId),
  ],
);

/** Wells that move water, and monitoring wells, whose operating columns stay null. */
export const wells = sqliteTable(
  'wells',
  {
    id: id().primaryKey(),
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'restrict' }),
    /** Order on the page and in a scenario. */
    position: integer('position').notNull(),
    name: text('name').notNull(),
    kind: text('kind', { enum: WELL_KINDS }).notNull(),
    xM: real('x_m').notNull(),
    yM: real('y_m').notNull(),
    radiusM: real('radius_m'),
    skin: real('skin'),
    /** False for a well that a plan may not move. */
    control: integer('control', { mode: 'boolean' }).notNull().default(false),
    minRateM3PerS: real('min_rate_m3_per_s'),
    maxRateM3PerS: real('max_rate_m3_per_s'),
    maxChangeM3PerSPerWeek: real('max_change_m3_per_s_per_week'),
    minPressurePa: real('min_pressure_pa'),
    maxPressurePa: real('max_pressure_pa'),
    heatJPerM3: real('heat_j_per_m3'),
  },
  (table) => [
    uniqueIndex('wells_field_name').on(table.fieldId, table.name),
    check(
      'wells_operating_complete',
      sql`${table.kind} = 'monitor' or (${table.radiusM} is not null and ${table.skin} is not null and ${table.minRateM3PerS} is not null and ${table.heatJPerM3} is not null)`,
    ),
  ],
);

/** A well that cannot run in whole weeks; both ends belong to the outage. */
export const outages = sqliteTable(
  'outages',
  {
    id: id().primaryKey(),
    wellId: id('well_id')
      .notNull()
      .references(() => wells.id, { onDelete: 'restrict' }),
    fromWeekStartsAt: at('from_week_starts_at').notNull(),
    toWeekStartsAt: at('to_week_starts_at').notNull(),
    reason: text('reason').notNull().default(''),
  },
  (table) => [
    index('outages_well').on(table.wellId),
    check('outages_order', sql`${table.fromWeekStartsAt} <= ${table.toWeekStartsAt}`),
  ],
);

/** One description of the ground. Never changed once written: a change is a new version. */
export const reservoirModelVersions = sqliteTable(
  'reservoir_model_versions',
  {
    id: id().primaryKey(),
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'restrict' }),
    number: integer('number').notNull(),
    /** The reservoir as in a scenario. */
    reservoir: jsonText('reservoir').notNull(),
    /** The seismicity as in a scenario, without its zones. */
    seismicity: jsonText('seismicity').notNull(),
    /** The version of the program that it was made for. */
    modelVersion: text('model_version').notNull(),
    accepted: integer('accepted', { mode: 'boolean' }).notNull().default(false),
    note: text('note').notNull().default(''),
    createdById: id('created_by_id').references(() => people.id, { onDelete: 'restrict' }),
    createdAt: at('created_at').notNull(),
  },
  (table) => [uniqueIndex('model_versions_number').on(table.fieldId, table.number)],
);

/** The seismic zones of one model version, in the order in which later ones win. */
export const zones = sqliteTable(
  'zones',
  {
    modelVersionId: id('model_version_id')
      .notNull()
      .references(() => reservoirModelVersions.id, { onDelete: 'restrict' }),
    position: integer('position').notNull(),
    name: text('name').notNull(),
    polygonM: jsonText('polygon_m').notNull(),
    weight: real('weight').notNull(),
  },
  (table) => [primaryKey({ columns: [table.modelVersionId, table.name] })],
);
