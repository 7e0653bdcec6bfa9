import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';

import { at, id, jsonText } from './columns';
import { fields } from './fields';
import { people } from './people';

export const AUDIT_EVENTS = [
  'demoFieldSeeded',
  'administratorCreated',
  'planRequested',
  'planComputed',
  'planFailed',
  'planWithdrawn',
  'jobCancelled',
] as const;
export type AuditEvent = (typeof AUDIT_EVENTS)[number];

/** Who did what when. Rows are only ever added. */
export const audit = sqliteTable(
  'audit',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    happenedAt: at('happened_at').notNull(),
    fieldId: id('field_id').references(() => fields.id, { onDelete: 'restrict' }),
    /** Null where the program itself acted. */
    personId: id('person_id').references(() => people.id, { onDelete: 'restrict' }),
    event: text('event', { enum: AUDIT_EVENTS }).notNull(),
    subjectId: text('subject_id'),
    details: jsonText('details').notNull().default('{}'),
  },
  (table) => [index('audit_field').on(table.fieldId, table.happenedAt)],
);
