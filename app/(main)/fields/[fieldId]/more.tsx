import { useLocalSearchParams } from 'expo-router';

import { MoreScreen } from '@/features/more/more-screen';

export default function MoreRoute() {
  const { fieldId } = useLocalSearchParams<{ fieldId: string }>();
  return <MoreScreen fieldId={fieldId} />;
}
