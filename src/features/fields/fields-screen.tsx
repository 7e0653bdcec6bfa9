import { View } from 'react-native';

import { useFields } from '../../api/fields';
import { useSession } from '../../session/session-provider';
import { Button } from '../../ui/button';
import { Screen } from '../../ui/layout/screen';
import { Shell } from '../../ui/layout/shell';
import { Empty, Failed, Loading } from '../../ui/layout/states';
import { SPACE } from '../../ui/theme';
import { Words } from '../../ui/words';
import { FieldCard } from './components/field-card';

export function FieldsScreen() {
  return (
    <Shell fieldId={null}>
      <Screen title="Fields">
        <Fields />
      </Screen>
    </Shell>
  );
}

function Fields() {
  const { data: fields, error, refetch } = useFields();
  const { signOut } = useSession();
  if (!fields) {
    return error ? (
      <Failed what="Your fields" error={error} retry={() => void refetch()} />
    ) : (
      <Loading what="your fields" />
    );
  }
  if (fields.length === 0) {
    return (
      <Empty title="You are not a member of a field yet">
        <Words tone="quiet" align="center">
          An administrator gives people their roles in a field. Ask them to add you, then come back.
        </Words>
        <Button onPress={() => void signOut()} icon="signOut">
          Sign out
        </Button>
      </Empty>
    );
  }
  return (
    <View role="list" style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.two }}>
      {fields.map((field) => (
        <FieldCard key={field.id} field={field} />
      ))}
    </View>
  );
}
