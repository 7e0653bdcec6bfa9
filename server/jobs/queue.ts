import { EventEmitter } from 'node:events';

import PQueue from 'p-queue';

import type { Db } from '../../db/client';
import { recordAudit } from '../../db/store/audit';
import {
  countJobsInState,
  findJob,
  findReusableJob,
  listJobsInState,
  moveJob,
  noteProgress,
  type JobRow,
} from '../../db/store/jobs';
import { findPlanScenario } from '../../db/store/plans';
import type { PlanResult } from '../../models/scenario/types';
import type { Logger } from '../log';
import { interrupted, tooLong } from './failure';
import type { Failure } from './messages';
import { recordPlanResult, takeOverResult } from './record-plan';
import { runInWorker, type Outcome, type RunningWork } from './run-in-worker';

export interface QueueSettings {
  db: Db;
  log: Logger;
  clock: () => number;
  concurrency: number;
  timeLimitS: number;
  workerEntry: URL;
  /** How long a stopped computation may take to notice. */
  graceMs?: number;
}

const MOST_ATTEMPTS = 2;
const WRITE_EVERY_MS = 250;
const HEARTBEAT_MS = 5_000;
/** Below this share done, an estimate of the time left would be a guess. */
const LEAST_FRACTION = 0.05;

/**
 * Orders jobs inside the process. The job table is the truth: whatever happens here is first a guarded
 * change of a row, so that a cancel and a finish at the same moment have exactly one outcome.
 */
export class JobQueue {
  private readonly queue: PQueue;
  private readonly working = new Map<string, RunningWork>();
  private readonly changes = new EventEmitter().setMaxListeners(0);
  private readonly graceMs: number;
  private stopping = false;

  constructor(private readonly settings: QueueSettings) {
    this.queue = new PQueue({ concurrency: settings.concurrency });
    this.graceMs = settings.graceMs ?? 5_000;
  }

  enqueue(jobId: string): void {
    void this.queue
      .add(() => this.run(jobId))
      .catch((error: unknown) => this.settings.log.error({ err: error, jobId }, 'a job broke the queue'));
  }

  /** Queued or running → cancelled. False: it had ended already. */
  cancel(jobId: string, personId: string): boolean {
    const { db, clock } = this.settings;
    const cancelled = db.transaction(
      (tx) => {
        const job = findJob(tx, jobId)?.job;
        if (!job) return false;
        const finishedAt = clock();
        const end = { finishedAt, secondsLeft: null, step: 'Stopped' };
        const moved =
          moveJob(tx, jobId, 'running', 'cancelled', end) || moveJob(tx, jobId, 'queued', 'cancelled', end);
        if (moved) {
          const { fieldId } = job;
          recordAudit(tx, {
            happenedAt: finishedAt,
            fieldId,
            personId,
            event: 'jobCancelled',
            subjectId: jobId,
          });
        }
        return moved;
      },
      { behavior: 'immediate' },
    );
    if (!cancelled) return false;
    this.working.get(jobId)?.stop(this.graceMs);
    this.announce(jobId);
    return true;
  }

  /** What an earlier process left: waiting jobs wait again, interrupted ones get a second try. */
  recover(): void {
    const { db } = this.settings;
    for (const job of listJobsInState(db, 'running')) {
      if (job.attempts < MOST_ATTEMPTS) {
        const step = 'Waiting again: the server stopped while this was being computed';
        moveJob(db, job.id, 'running', 'queued', { step, progress: 0, secondsLeft: null });
      } else {
        this.fail(job.id, interrupted);
      }
    }
    for (const job of listJobsInState(db, 'queued')) this.enqueue(job.id);
  }

  load(): { running: number; waiting: number } {
    const { db } = this.settings;
    return { running: countJobsInState(db, 'running'), waiting: countJobsInState(db, 'queued') };
  }

  onChange(jobId: string, listener: () => void): () => void {
    this.changes.on(jobId, listener);
    return () => this.changes.off(jobId, listener);
  }

  /** How many follow a job at the moment. */
  watchers(jobId: string): number {
    return this.changes.listenerCount(jobId);
  }

  /** Everything that was handed over has ended. */
  idle(): Promise<void> {
    return this.queue.onIdle();
  }

  /** Before the process ends: running jobs go back to waiting, without this counting as a failed try. */
  async stop(): Promise<void> {
    this.stopping = true;
    this.queue.clear();
    for (const [jobId, work] of this.working) {
      const attempts = (findJob(this.settings.db, jobId)?.job.attempts ?? 1) - 1;
      const step = 'Waiting for the server to start again';
      moveJob(this.settings.db, jobId, 'running', 'queued', {
        attempts,
        step,
        progress: 0,
        secondsLeft: null,
      });
      work.stop(500);
    }
    await this.queue.onIdle();
  }

  private async run(jobId: string): Promise<void> {
    if (this.stopping) return;
    const job = this.claim(jobId);
    if (!job) return;
    const { db, log, clock } = this.settings;
    const scenario = JSON.parse(findPlanScenario(db, job.planId!)!) as unknown;
    const startedAt = clock();
    let progress = { progress: 0, step: 'Starting', secondsLeft: null as number | null };
    let writtenAt = 0;
    const write = () => {
      writtenAt = clock();
      if (noteProgress(db, jobId, { ...progress, heartbeatAt: writtenAt })) this.announce(jobId);
    };
    const work = runInWorker(this.settings.workerEntry, scenario, (fraction, step) => {
      // The bar never runs backwards, whatever the estimate inside does.
      const done = Math.min(1, Math.max(progress.progress, fraction));
      progress = { progress: done, step, secondsLeft: secondsLeft(done, clock() - startedAt) };
      if (clock() - writtenAt >= WRITE_EVERY_MS) write();
    });
    this.working.set(jobId, work);
    const heartbeat = setInterval(write, HEARTBEAT_MS);
    const limit = setTimeout(() => {
      this.fail(jobId, tooLong(this.settings.timeLimitS));
      work.stop(this.graceMs);
    }, this.settings.timeLimitS * 1000);
    try {
      this.end(jobId, await work.outcome);
    } catch (error) {
      log.error({ err: error, jobId }, 'a result could not be written down');
      this.fail(jobId, {
        code: 'INTERNAL',
        message: 'The result could not be written down. It has been noted in the log.',
        details: [],
      });
    } finally {
      clearInterval(heartbeat);
      clearTimeout(limit);
      this.working.delete(jobId);
    }
  }

  /** Queued → running, unless somebody cancelled it or an identical job has finished in the meantime. */
  private claim(jobId: string): JobRow | null {
    const { db, clock } = this.settings;
    const claimed = db.transaction(
      (tx) => {
        const job = findJob(tx, jobId)?.job;
        if (job?.state !== 'queued') return null;
        const earlier = findReusableJob(tx, job.inputHash, job.modelVersion);
        if (earlier && takeOverResult(tx, jobId, earlier, clock())) return null;
        const startedAt = clock();
        const attempts = job.attempts + 1;
        const start = { startedAt, heartbeatAt: startedAt, attempts, progress: 0, step: 'Starting' };
        return moveJob(tx, jobId, 'queued', 'running', start) ? job : null;
      },
      { behavior: 'immediate' },
    );
    this.announce(jobId);
    return claimed;
  }

  private end(jobId: string, outcome: Outcome): void {
    const { db, clock } = this.settings;
    if (outcome.kind === 'failed') return this.fail(jobId, outcome.failure);
    // A stopped job was moved by whoever stopped it; nothing else is left to write.
    if (outcome.kind === 'stopped') return;
    db.transaction((tx) => recordPlanResult(tx, jobId, outcome.result as PlanResult, clock()), {
      behavior: 'immediate',
    });
    this.announce(jobId);
  }

  private fail(jobId: string, failure: Failure): void {
    const { db, clock, log } = this.settings;
    const failed = db.transaction(
      (tx) => {
        const job = findJob(tx, jobId)?.job;
        const finishedAt = clock();
        const moved = moveJob(tx, jobId, 'running', 'failed', {
          finishedAt,
          secondsLeft: null,
          step: 'Failed',
          failureCode: failure.code,
          failureMessage: failure.message,
          failureDetails: JSON.stringify(failure.details),
        });
        if (moved) {
          recordAudit(tx, {
            happenedAt: finishedAt,
            fieldId: job!.fieldId,
            personId: null,
            event: 'planFailed',
            subjectId: job!.planId,
            details: { jobId, code: failure.code },
          });
        }
        return moved;
      },
      { behavior: 'immediate' },
    );
    if (!failed) return;
    log.warn({ jobId, code: failure.code, reason: failure.log ?? failure.details }, 'a job failed');
    this.announce(jobId);
  }

  private announce(jobId: string): void {
    this.changes.emit(jobId);
  }
}

function secondsLeft(fraction: number, elapsedMs: number): number | null {
  if (fraction < LEAST_FRACTION) return null;
  return ((elapsedMs / 1000) * (1 - fraction)) / fraction;
}
