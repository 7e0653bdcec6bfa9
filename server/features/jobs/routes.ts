import { listJobs as listJobRows } from '../../../db/store/jobs';
import { cancelJob as cancelJobContract, getJob, listJobs, watchJob } from '../../../src/contract/jobs';
import { memberEndpoint, memberEventStream } from '../../http/endpoint';
import { mayCancelJob, mayReadJobs } from './policy';
import { cancelJob, followJob, presentJob, requireJob } from './service';

const JOBS_LISTED = 50;

export const jobEndpoints = {
  listJobs: memberEndpoint(listJobs, {
    load: ({ context, params }) => listJobRows(context.database.db, params.fieldId, JOBS_LISTED),
    policy: mayReadJobs,
    act: ({ subject, who }) => ({ jobs: subject.map((row) => presentJob(row, who.roles)) }),
  }),
  getJob: memberEndpoint(getJob, {
    load: ({ context, params }) => requireJob(context, params.fieldId, params.jobId),
    policy: mayReadJobs,
    act: ({ subject, who }) => presentJob(subject, who.roles),
  }),
  cancelJob: memberEndpoint(cancelJobContract, {
    load: ({ context, params }) => requireJob(context, params.fieldId, params.jobId),
    policy: mayCancelJob,
    act: ({ context, who, subject }) => presentJob(cancelJob(context, who, subject), who.roles),
  }),
  watchJob: memberEventStream(watchJob, {
    load: ({ context, params }) => requireJob(context, params.fieldId, params.jobId),
    policy: mayReadJobs,
    act: ({ context, who, subject, lastEventId }) => followJob(context, subject, who.roles, lastEventId),
  }),
};
