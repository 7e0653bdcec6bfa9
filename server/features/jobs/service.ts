import { findJob, type JobWithRequester } from '../../../db/store/jobs';
import type { Role } from '../../../src/contract/enums';
import type { Job } from '../../../src/contract/jobs';
import type { Context } from '../../context';
import { conflict, notFound } from '../../errors';
import type { EventStream } from '../../http/events';
import type { Actor } from '../../http/session';
import { presentJob } from './present';

export { presentJob } from './present';

export function requireJob(context: Context, fieldId: string, jobId: string): JobWithRequester {
  const found = findJob(context.database.db, jobId);
  if (!found || found.job.fieldId !== fieldId) throw notFound('The job');
  return found;
}

export function cancelJob(context: Context, actor: Actor, { job }: JobWithRequester): JobWithRequester {
  if (!context.jobs.cancel(job.id, actor.id)) {
    throw conflict('JOB_ALREADY_ENDED', 'The job has ended already, so there is nothing to stop.');
  }
  return requireJob(context, job.fieldId, job.id);
}

/** Sends a job at every change until it ends; null where it has ended and the client knows. */
export function followJob(
  context: Context,
  { job }: JobWithRequester,
  roles: readonly Role[],
  lastEventId: string | null,
): ((stream: EventStream<Job>) => void) | null {
  if (job.finishedAt !== null && String(job.revision) === lastEventId) return null;
  return (stream) => {
    let sentId = lastEventId;
    const sendNewest = () => {
      const newest = requireJob(context, job.fieldId, job.id);
      const id = String(newest.job.revision);
      if (id !== sentId) stream.send('job', id, presentJob(newest, roles));
      sentId = id;
      if (newest.job.finishedAt !== null) stream.end();
    };
    stream.onClose(context.jobs.onChange(job.id, sendNewest));
    sendNewest();
  };
}
