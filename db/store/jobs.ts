import { and, asc, desc, eq, inArray, isNull, sql } from 'drizzle-orm';

import type { JobState } from '../../src/contract/enums';
import type { Db } from '../client';
import { jobs } from '../schema/jobs';
import { people } from '../schema/people';

export type JobRow = typeof jobs.$inferSelect;
export interface JobWithRequester {
  job: JobRow;
  requestedBy: { id: string; name: string };
}
type Changes = Partial<Omit<typeof jobs.$inferInsert, 'id' | 'state' | 'revision'>>;

const requester = { id: people.id, name: people.name };

export function insertJob(db: Db, job: typeof jobs.$inferInsert): void {
  db.insert(jobs).values(job).run();
}

export function findJob(db: Db, jobId: string): JobWithRequester | undefined {
  return db
    .select({ job: jobs, requestedBy: requester })
    .from(jobs)
    .innerJoin(people, eq(people.id, jobs.requestedById))
    .where(eq(jobs.id, jobId))
    .get();
}

export function listJobs(db: Db, fieldId: string, limit: number): JobWithRequester[] {
  return db
    .select({ job: jobs, requestedBy: requester })
    .from(jobs)
    .innerJoin(people, eq(people.id, jobs.requestedById))
    .where(eq(jobs.fieldId, fieldId))
    .orderBy(desc(jobs.createdAt), desc(sql`${jobs}.rowid`))
    .limit(limit)
    .all();
}

/** The job of each plan of a field: the newest where there are several. */
export function jobsByPlan(db: Db, fieldId: string): Map<string, JobRow> {
  const rows = db.select().from(jobs).where(eq(jobs.fieldId, fieldId)).orderBy(asc(jobs.createdAt)).all();
  return new Map(rows.flatMap((row) => (row.planId ? [[row.planId, row] as const] : [])));
}

export function findJobOfPlan(db: Db, planId: string): JobRow | undefined {
  return db.select().from(jobs).where(eq(jobs.planId, planId)).orderBy(desc(jobs.createdAt)).limit(1).get();
}

export function newestOpenJob(db: Db, fieldId: string): JobRow | undefined {
  return db
    .select()
    .from(jobs)
    .where(and(eq(jobs.fieldId, fieldId), inArray(jobs.state, ['queued', 'running'])))
    .orderBy(desc(jobs.createdAt))
    .limit(1)
    .get();
}

export function listJobsInState(db: Db, state: JobState): JobRow[] {
  return db.select().from(jobs).where(eq(jobs.state, state)).orderBy(asc(jobs.createdAt)).all();
}

export function countJobsInState(db: Db, state: JobState): number {
  const row = db
    .select({ count: sql<number>`count(*)` })
    .from(jobs)
    .where(eq(jobs.state, state))
    .get();
  return row?.count ?? 0;
}

/** A finished job that computed the same input with the same model, to take its result over. */
export function findReusableJob(db: Db, inputHash: string, modelVersion: string): JobRow | undefined {
  return db
    .select()
    .from(jobs)
    .where(
      and(
        eq(jobs.inputHash, inputHash),
        eq(jobs.modelVersion, modelVersion),
        eq(jobs.state, 'done'),
        isNull(jobs.reusedFromId),
      ),
    )
    .limit(1)
    .get();
}

/** Seconds that the latest computed jobs of a kind took, newest first. */
export function recentDurationsS(db: Db, fieldId: string, kind: JobRow['kind'], limit: number): number[] {
  return db
    .select({ startedAt: jobs.startedAt, finishedAt: jobs.finishedAt })
    .from(jobs)
    .where(
      and(eq(jobs.fieldId, fieldId), eq(jobs.kind, kind), eq(jobs.state, 'done'), isNull(jobs.reusedFromId)),
    )
    .orderBy(desc(jobs.finishedAt))
    .limit(limit)
    .all()
    .flatMap((row) =>
      row.startedAt !== null && row.finishedAt !== null ? [(row.finishedAt - row.startedAt) / 1000] : [],
    );
}

/** Moves a job on only if it is still in `from`; false: it was moved by somebody else first. */
export function moveJob(db: Db, jobId: string, from: JobState, to: JobState, changes: Changes = {}): boolean {
  const moved = db
    .update(jobs)
    .set({ ...changes, state: to, revision: sql`${jobs.revision} + 1` })
    .where(and(eq(jobs.id, jobId), eq(jobs.state, from)))
    .run();
  return moved.changes === 1;
}

export function noteProgress(
  db: Db,
  jobId: string,
  progress: { progress: number; step: string; secondsLeft: number | null; heartbeatAt: number },
): boolean {
  return moveJob(db, jobId, 'running', 'running', progress);
}
