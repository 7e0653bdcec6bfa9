import { useLocalSearchParams } from 'expo-router';

import { PlanScreen } from '@/features/plans/plan-screen';

export default function PlanRoute() {
  const { fieldId, planId } = useLocalSearchParams<{ fieldId: string; planId: string }>();
  return <PlanScreen key={planId} fieldId={fieldId} planId={planId} />;
}
