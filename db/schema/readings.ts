import { sql } from 'drizzle-orm';
import { check, index, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';

import { at, id } from './columns';
import { fields, wells } from './fields';

/** The metered mean rate of one well in one week, as a magnitude: the well's kind is its direction. */
export const meteredRates = sqliteTable(
  'metered_rates',
  {
    wellId: id('well_id')
      .notNull()
      .references(() => wells.id, { onDelete: 'restrict' }),
    weekStartsAt: at('week_starts_at').notNull(),
    rateM3PerS: real('rate_m3_per_s').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.wellId, table.weekStartsAt] }),
    check('metered_rates_magnitude', sql`${table.rateM3PerS} >= 0`),
  ],
);

export const seismicEvents = sqliteTable(
  'seismic_events',
  {
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'restrict' }),
    /** The network's own identifier. */
    publicId: text('public_id').notNull(),
    occurredAt: at('occurred_at').notNull(),
    xM: real('x_m').notNull(),
    yM: real('y_m').notNull(),
    depthM: real('depth_m').notNull(),
    magnitude: real('magnitude').notNull(),
    magnitudeType: text('magnitude_type').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.fieldId, table.publicId] }),
    index('seismic_events_time').on(table.fieldId, table.occurredAt),
  ],
);

/** The targets calendar: heat sold per week. */
export const heatTargets = sqliteTable(
  'heat_targets',
  {
    fieldId: id('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'restrict' }),
    weekStartsAt: at('week_starts_at').notNull(),
    heatJ: real('heat_j').notNull(),
  },
  (table) => [primaryKey({ columns: [table.fieldId, table.weekStartsAt] })],
);
