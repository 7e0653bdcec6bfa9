import { FieldsScreen } from '@/features/fields/fields-screen';

export default function FieldsRoute() {
  return <FieldsScreen />;
}
