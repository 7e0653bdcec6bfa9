import { useLocalSearchParams } from 'expo-router';

import { PlansScreen } from '@/features/plans/plans-screen';

export default function PlansRoute() {
  const { fieldId } = useLocalSearchParams<{ fieldId: string }>();
  return <PlansScreen fieldId={fieldId} />;
}
