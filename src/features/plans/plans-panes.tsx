import { usePathname } from 'expo-router';
import { type ReactNode } from 'react';
import { View } from 'react-native';

import { useWidth } from '../../lib/use-width';
import { SPACE, useTokens } from '../../ui/theme';
import { Words } from '../../ui/words';
import { PlanList } from './components/plan-list';

const LIST_WIDTH = 288;

/** On a wide screen the list stays beside the plan; building one takes all the room. */
export function PlansPanes({ fieldId, children }: { fieldId: string; children: ReactNode }) {
  const tokens = useTokens();
  const { hasTwoPanes } = useWidth();
  const isBuilding = usePathname().endsWith('/plans/new');
  if (!hasTwoPanes || isBuilding) return children;
  return (
    <View style={{ flexDirection: 'row', width: '100%', flexGrow: 1 }}>
      <View
        role="complementary"
        aria-label="Plans"
        style={{
          width: LIST_WIDTH,
          position: 'sticky' as 'relative',
          top: 0,
          height: '100vh' as '100%',
          overflow: 'auto' as 'scroll',
          borderRightWidth: 1,
          borderRightColor: tokens.hairline,
          paddingTop: SPACE.four,
          paddingHorizontal: SPACE.two,
          gap: SPACE.two,
        }}
      >
        <Words size="title" weight="medium" level={2} style={{ paddingHorizontal: SPACE.one }}>
          Plans
        </Words>
        <PlanList fieldId={fieldId} />
      </View>
      <View style={{ flex: 1, minWidth: 0 }}>{children}</View>
    </View>
  );
}
