import type { JobWithRequester } from '../../../db/store/jobs';
import type { Role } from '../../../src/contract/enums';
import type { Job } from '../../../src/contract/jobs';
import { jobOffers } from './policy';

export function presentJob({ job, requestedBy }: JobWithRequester, roles: readonly Role[]): Job {
  const { id, fieldId, kind, state, progress, step, secondsLeft, planId, attempts } = job;
  const failure =
    job.failureCode === null
      ? null
      : {
          code: job.failureCode,
          message: job.failureMessage ?? '',
          details: JSON.parse(job.failureDetails ?? '[]') as string[],
        };
  return {
    id,
    fieldId,
    kind,
    state,
    progress,
    step,
    secondsLeft,
    failure,
    planId,
    requestedBy,
    attempts,
    createdAt: job.createdAt,
    startedAt: job.startedAt,
    finishedAt: job.finishedAt,
    can: jobOffers({ roles }, state),
  };
}
