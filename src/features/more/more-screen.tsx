import { View } from 'react-native';

import { useWidth } from '../../lib/use-width';
import { useMe } from '../../session/session-provider';
import { Screen } from '../../ui/layout/screen';
import { SPACE } from '../../ui/theme';
import { About } from './components/about';
import { Account } from './components/account';
import { Jobs } from './components/jobs';

export function MoreScreen({ fieldId }: { fieldId: string }) {
  const { hasTwoPanes } = useWidth();
  const me = useMe();
  if (!me) return null;
  const fieldName = me.memberships.find((membership) => membership.fieldId === fieldId)?.fieldName;
  return (
    <Screen title="More" of={fieldName}>
      <View
        style={{ flexDirection: hasTwoPanes ? 'row' : 'column', gap: hasTwoPanes ? SPACE.six : SPACE.four }}
      >
        <View style={{ flex: hasTwoPanes ? 1 : undefined, minWidth: 0 }}>
          <Jobs fieldId={fieldId} />
        </View>
        <View style={{ width: hasTwoPanes ? 400 : '100%', gap: SPACE.four }}>
          <Account me={me} />
          <About />
        </View>
      </View>
    </Screen>
  );
}
