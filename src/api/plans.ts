import { useQuery } from '@tanstack/react-query';

import { getPlan } from '../contract/plans';
import { isOpenJob } from '../lib/words';
import { callEndpoint } from './client';
import { keys } from './keys';

/** A computed plan does not change by itself; one under way is watched through its job. */
export const usePlan = (fieldId: string, planId: string | null) =>
  useQuery({
    queryKey: keys.plan(fieldId, planId ?? ''),
    queryFn: ({ signal }) => callEndpoint(getPlan, { params: { fieldId, planId: planId ?? '' }, signal }),
    enabled: planId !== null,
    staleTime: ({ state }) => (state.data?.plan.jobState && isOpenJob(state.data.plan.jobState) ? 0 : 60_000),
  });
