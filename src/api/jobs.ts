import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';

import { cancelJob, getJob, job as jobContract, listJobs, watchJob, type Job } from '../contract/jobs';
import { isOpenJob } from '../lib/words';
import { callEndpoint, pathOf } from './client';
import { keys } from './keys';

const POLL_MS = 1500;

export const useJobs = (fieldId: string) =>
  useQuery({
    queryKey: keys.jobs(fieldId),
    queryFn: ({ signal }) => callEndpoint(listJobs, { params: { fieldId }, signal }),
    select: (reply) => reply.jobs,
    refetchInterval: ({ state }) =>
      state.data?.jobs.some((job) => isOpenJob(job.state)) ? 2 * POLL_MS : false,
  });

/** One job, followed to its end: by the server's own events, by asking again where they do not come through. */
export function useJob(fieldId: string, jobId: string) {
  const [isStreaming, setIsStreaming] = useState(false);
  const client = useQueryClient();
  const query = useQuery({
    queryKey: keys.job(fieldId, jobId),
    queryFn: ({ signal }) => callEndpoint(getJob, { params: { fieldId, jobId }, signal }),
    refetchInterval: ({ state }) =>
      !isStreaming && (!state.data || isOpenJob(state.data.state)) ? POLL_MS : false,
  });
  const isOpen = query.data !== undefined && isOpenJob(query.data.state);

  useEffect(() => {
    if (!isOpen || typeof EventSource === 'undefined') return;
    const source = new EventSource(pathOf(watchJob, { fieldId, jobId }));
    source.addEventListener('open', () => setIsStreaming(true));
    source.addEventListener('error', () => setIsStreaming(false));
    source.addEventListener('job', (event) => {
      const job = jobContract.safeParse(JSON.parse((event as MessageEvent<string>).data));
      if (!job.success) return;
      client.setQueryData(keys.job(fieldId, jobId), job.data);
      if (!isOpenJob(job.data.state)) source.close();
    });
    return () => {
      source.close();
      setIsStreaming(false);
    };
  }, [client, fieldId, jobId, isOpen]);

  // What the job has made is on other screens too.
  const endedAs = query.data && !isOpenJob(query.data.state) ? query.data.state : null;
  useEffect(() => {
    if (endedAs === null) return;
    void client.invalidateQueries({
      queryKey: keys.field(fieldId),
      predicate: ({ queryKey }) => queryKey[2] !== 'job',
    });
    void client.invalidateQueries({ queryKey: keys.fields });
  }, [client, fieldId, endedAs]);
  return query;
}

export function useCancelJob(fieldId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (jobId: string) => callEndpoint(cancelJob, { params: { fieldId, jobId } }),
    onSuccess: (job: Job) => {
      client.setQueryData(keys.job(fieldId, job.id), job);
      return client.invalidateQueries({ queryKey: keys.field(fieldId) });
    },
  });
}
