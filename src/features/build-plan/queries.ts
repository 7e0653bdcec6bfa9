import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import type { BodyInputOf } from '../../contract/endpoint';
import { buildPlan, checkTarget, getPlanDefaults, type PlanRequest } from '../../contract/plans';

export const usePlanDefaults = (fieldId: string) =>
  useQuery({
    queryKey: keys.planDefaults(fieldId),
    queryFn: ({ signal }) => callEndpoint(getPlanDefaults, { params: { fieldId }, signal }),
    // What somebody is typing into must not change under their hands.
    staleTime: Infinity,
    gcTime: 0,
  });

/** Asks while somebody types; the last answer stays until the next one is there. */
export const useTargetCheck = (fieldId: string, body: BodyInputOf<typeof checkTarget> | null) =>
  useQuery({
    queryKey: [...keys.planDefaults(fieldId), 'check', body],
    queryFn: ({ signal }) =>
      callEndpoint(checkTarget, {
        params: { fieldId },
        body: body as BodyInputOf<typeof checkTarget>,
        signal,
      }),
    enabled: body !== null,
    placeholderData: keepPreviousData,
    staleTime: 60_000,
    retry: false,
  });

export function useBuildPlan(fieldId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (request: PlanRequest) => callEndpoint(buildPlan, { params: { fieldId }, body: request }),
    onSuccess: async ({ job }) => {
      client.setQueryData(keys.job(fieldId, job.id), job);
      await client.invalidateQueries({
        queryKey: keys.field(fieldId),
        predicate: ({ queryKey }) => queryKey[2] !== 'plan-defaults' && queryKey[2] !== 'job',
      });
    },
  });
}
