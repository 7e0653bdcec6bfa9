import { Slot, useLocalSearchParams } from 'expo-router';

import { PlansPanes } from '@/features/plans/plans-panes';

export default function PlansLayout() {
  const { fieldId } = useLocalSearchParams<{ fieldId: string }>();
  return (
    <PlansPanes fieldId={fieldId}>
      <Slot />
    </PlansPanes>
  );
}
