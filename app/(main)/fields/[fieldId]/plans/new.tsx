import { useLocalSearchParams } from 'expo-router';

import { BuildPlanScreen } from '@/features/build-plan/build-plan-screen';

export default function BuildPlanRoute() {
  const { fieldId, like } = useLocalSearchParams<{ fieldId: string; like?: string }>();
  return <BuildPlanScreen fieldId={fieldId} like={like ?? null} />;
}
