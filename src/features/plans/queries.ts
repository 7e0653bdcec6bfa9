import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import { getPlanScenario, listPlans, withdrawPlan } from '../../contract/plans';

export const usePlans = (fieldId: string) =>
  useQuery({
    queryKey: keys.plans(fieldId),
    queryFn: ({ signal }) => callEndpoint(listPlans, { params: { fieldId }, signal }),
  });

/** A change to one plan shows in the list, in the week and on the fields' cards. */
export function useWithdrawPlan(fieldId: string, planId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => callEndpoint(withdrawPlan, { params: { fieldId, planId } }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: keys.field(fieldId) }),
        client.invalidateQueries({ queryKey: keys.fields }),
      ]),
  });
}

export const useScenarioFile = (fieldId: string, planId: string) =>
  useMutation({
    mutationFn: () => callEndpoint(getPlanScenario, { params: { fieldId, planId } }),
  });
