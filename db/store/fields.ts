import { and, asc, desc, eq, gte, inArray, lte } from 'drizzle-orm';

import type { Db } from '../client';
import { fields, outages, reservoirModelVersions, wells, zones } from '../schema/fields';

export type FieldRow = typeof fields.$inferSelect;
export type WellRow = typeof wells.$inferSelect;
export type ModelVersionRow = typeof reservoirModelVersions.$inferSelect;
export type ZoneRow = typeof zones.$inferSelect;
export type OutageRow = typeof outages.$inferSelect;

export function insertField(db: Db, field: typeof fields.$inferInsert): void {
  db.insert(fields).values(field).run();
}

export function findField(db: Db, fieldId: string): FieldRow | undefined {
  return db.select().from(fields).where(eq(fields.id, fieldId)).get();
}

export function listFieldsById(db: Db, fieldIds: string[]): FieldRow[] {
  return db.select().from(fields).where(inArray(fields.id, fieldIds)).orderBy(asc(fields.name)).all();
}

export function listAllFieldIds(db: Db): string[] {
  return db
    .select({ id: fields.id })
    .from(fields)
    .all()
    .map((row) => row.id);
}

export function insertWells(db: Db, rows: (typeof wells.$inferInsert)[]): void {
  for (const row of rows) db.insert(wells).values(row).run();
}

export function listWells(db: Db, fieldId: string): WellRow[] {
  return db.select().from(wells).where(eq(wells.fieldId, fieldId)).orderBy(asc(wells.position)).all();
}

export function insertOutage(db: Db, outage: typeof outages.$inferInsert): void {
  db.insert(outages).values(outage).run();
}

/** Outages of the field's wells that touch the span, both ends included. */
export function listOutages(db: Db, fieldId: string, fromAt: number, toAt: number): OutageRow[] {
  return db
    .select({ outage: outages })
    .from(outages)
    .innerJoin(wells, eq(wells.id, outages.wellId))
    .where(
      and(
        eq(wells.fieldId, fieldId),
        lte(outages.fromWeekStartsAt, toAt),
        gte(outages.toWeekStartsAt, fromAt),
      ),
    )
    .orderBy(asc(wells.position), asc(outages.fromWeekStartsAt))
    .all()
    .map((row) => row.outage);
}

export function insertModelVersion(
  db: Db,
  version: typeof reservoirModelVersions.$inferInsert,
  versionZones: (typeof zones.$inferInsert)[],
): void {
  db.insert(reservoirModelVersions).values(version).run();
  for (const zone of versionZones) db.insert(zones).values(zone).run();
}

/** The newest version that somebody accepted: the one that plans use. */
export function findAcceptedModel(db: Db, fieldId: string): ModelVersionRow | undefined {
  return db
    .select()
    .from(reservoirModelVersions)
    .where(and(eq(reservoirModelVersions.fieldId, fieldId), eq(reservoirModelVersions.accepted, true)))
    .orderBy(desc(reservoirModelVersions.number))
    .limit(1)
    .get();
}

export function listZones(db: Db, modelVersionId: string): ZoneRow[] {
  return db
    .select()
    .from(zones)
    .where(eq(zones.modelVersionId, modelVersionId))
    .orderBy(asc(zones.position))
    .all();
}
