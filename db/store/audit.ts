import { asc, eq } from 'drizzle-orm';

import type { Db } from '../client';
import { audit, type AuditEvent } from '../schema/audit';

export interface AuditEntry {
  happenedAt: number;
  fieldId: string | null;
  personId: string | null;
  event: AuditEvent;
  subjectId: string | null;
  details?: Record<string, string | number | boolean | null>;
}

export function recordAudit(db: Db, entry: AuditEntry): void {
  db.insert(audit)
    .values({ ...entry, details: JSON.stringify(entry.details ?? {}) })
    .run();
}

export function listAudit(db: Db, fieldId: string): (typeof audit.$inferSelect)[] {
  return db.select().from(audit).where(eq(audit.fieldId, fieldId)).orderBy(asc(audit.id)).all();
}
