import { and, asc, desc, eq, gte, lt } from 'drizzle-orm';

import type { Db } from '../client';
import { wells } from '../schema/fields';
import { heatTargets, meteredRates, seismicEvents } from '../schema/readings';

export interface MeteredRate {
  wellId: string;
  weekStartsAt: number;
  rateM3PerS: number;
}

export function insertMeteredRate(db: Db, rate: MeteredRate): void {
  db.insert(meteredRates).values(rate).run();
}

/** Every metered rate of weeks that begin before `beforeAt`, oldest first. */
export function listMeteredRates(db: Db, fieldId: string, beforeAt: number, fromAt = 0): MeteredRate[] {
  return db
    .select({
      wellId: meteredRates.wellId,
      weekStartsAt: meteredRates.weekStartsAt,
      rateM3PerS: meteredRates.rateM3PerS,
    })
    .from(meteredRates)
    .innerJoin(wells, eq(wells.id, meteredRates.wellId))
    .where(
      and(
        eq(wells.fieldId, fieldId),
        lt(meteredRates.weekStartsAt, beforeAt),
        gte(meteredRates.weekStartsAt, fromAt),
      ),
    )
    .orderBy(asc(meteredRates.weekStartsAt), asc(wells.position))
    .all();
}

export function newestMeteredWeek(db: Db, fieldId: string): number | null {
  const row = db
    .select({ weekStartsAt: meteredRates.weekStartsAt })
    .from(meteredRates)
    .innerJoin(wells, eq(wells.id, meteredRates.wellId))
    .where(eq(wells.fieldId, fieldId))
    .orderBy(desc(meteredRates.weekStartsAt))
    .limit(1)
    .get();
  return row?.weekStartsAt ?? null;
}

export function insertSeismicEvent(db: Db, event: typeof seismicEvents.$inferInsert): void {
  db.insert(seismicEvents).values(event).run();
}

export function listEventTimes(
  db: Db,
  fieldId: string,
  fromAt: number,
  beforeAt: number,
  fromMagnitude: number,
): number[] {
  return db
    .select({ occurredAt: seismicEvents.occurredAt })
    .from(seismicEvents)
    .where(
      and(
        eq(seismicEvents.fieldId, fieldId),
        gte(seismicEvents.occurredAt, fromAt),
        lt(seismicEvents.occurredAt, beforeAt),
        gte(seismicEvents.magnitude, fromMagnitude),
      ),
    )
    .orderBy(asc(seismicEvents.occurredAt))
    .all()
    .map((row) => row.occurredAt);
}

export function newestEventAt(db: Db, fieldId: string): number | null {
  const row = db
    .select({ occurredAt: seismicEvents.occurredAt })
    .from(seismicEvents)
    .where(eq(seismicEvents.fieldId, fieldId))
    .orderBy(desc(seismicEvents.occurredAt))
    .limit(1)
    .get();
  return row?.occurredAt ?? null;
}

export function insertHeatTarget(db: Db, target: typeof heatTargets.$inferInsert): void {
  db.insert(heatTargets).values(target).run();
}

export function listHeatTargets(
  db: Db,
  fieldId: string,
  fromAt: number,
  beforeAt: number,
): { weekStartsAt: number; heatJ: number }[] {
  return db
    .select({ weekStartsAt: heatTargets.weekStartsAt, heatJ: heatTargets.heatJ })
    .from(heatTargets)
    .where(
      and(
        eq(heatTargets.fieldId, fieldId),
        gte(heatTargets.weekStartsAt, fromAt),
        lt(heatTargets.weekStartsAt, beforeAt),
      ),
    )
    .orderBy(asc(heatTargets.weekStartsAt))
    .all();
}
