import { z } from 'zod';

import { at, id, person } from './common';
import { defineEndpoint } from './define-endpoint';
import { JOB_KINDS, JOB_STATES } from './enums';

export const job = z.object({
  id,
  fieldId: id,
  kind: z.enum(JOB_KINDS),
  state: z.enum(JOB_STATES),
  /** 0 … 1. */
  progress: z.number().min(0).max(1),
  /** What it does now, in plain words. */
  step: z.string(),
  /** Estimated time left; null while there is nothing to estimate from. */
  secondsLeft: z.number().nullable(),
  /** Why it failed or was not possible, for the person. */
  failure: z
    .object({
      code: z.string(),
      message: z.string(),
      /** For an impossible plan: the limits that collide, one sentence each, with amounts. */
      details: z.array(z.string()),
    })
    .nullable(),
  planId: id.nullable(),
  requestedBy: person,
  attempts: z.number().int(),
  createdAt: at,
  startedAt: at.nullable(),
  finishedAt: at.nullable(),
  can: z.object({ cancel: z.boolean() }),
});
export type Job = z.output<typeof job>;

const jobParams = z.object({ fieldId: id, jobId: id });

export const listJobs = defineEndpoint({
  id: 'listJobs',
  method: 'GET',
  path: '/api/fields/:fieldId/jobs',
  summary: 'The latest jobs of a field, newest first',
  access: 'member',
  params: z.object({ fieldId: id }),
  reply: z.object({ jobs: z.array(job) }),
});

export const getJob = defineEndpoint({
  id: 'getJob',
  method: 'GET',
  path: '/api/fields/:fieldId/jobs/:jobId',
  summary: 'One job',
  access: 'member',
  params: jobParams,
  reply: job,
});

export const cancelJob = defineEndpoint({
  id: 'cancelJob',
  method: 'POST',
  path: '/api/fields/:fieldId/jobs/:jobId/cancel',
  summary: 'Stop a queued or running job',
  access: 'member',
  params: jobParams,
  reply: job,
  errors: ['JOB_ALREADY_ENDED'],
});

/** Server-sent events: `event: job` with a job as data, at every change, until it ends. */
export const watchJob = defineEndpoint({
  id: 'watchJob',
  method: 'GET',
  path: '/api/fields/:fieldId/jobs/:jobId/events',
  summary: 'Progress of a job as server-sent events',
  access: 'member',
  params: jobParams,
  reply: job,
  produces: 'eventStream',
});
