import { Slot, useLocalSearchParams } from 'expo-router';

import { Shell } from '@/ui/layout/shell';

export default function FieldLayout() {
  const { fieldId } = useLocalSearchParams<{ fieldId: string }>();
  return (
    <Shell fieldId={fieldId}>
      <Slot />
    </Shell>
  );
}
