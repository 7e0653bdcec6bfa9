import { useLocalSearchParams } from 'expo-router';

import { ThisWeekScreen } from '@/features/this-week/this-week-screen';

export default function ThisWeekRoute() {
  const { fieldId } = useLocalSearchParams<{ fieldId: string }>();
  return <ThisWeekScreen fieldId={fieldId} />;
}
