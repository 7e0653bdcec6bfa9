import { usePathname, useRouter } from 'expo-router';
import { type ReactNode } from 'react';
import { View } from 'react-native';

import { useWidth } from '../../lib/use-width';
import { SPACE, useTokens } from '../../ui/theme';
import { Words } from '../../ui/words';
import { Button } from '../../ui/button';
import { PlanList } from './components/plan-list';
import { usePlans } from './queries';

const LIST_WIDTH = 288;

/** On a wide screen the list stays beside the plan; building one takes all the room. */
export function PlansPanes({ fieldId, children }: { fieldId: string; children: ReactNode }) {
  const tokens = useTokens();
  const { hasTwoPanes } = useWidth();
  const pathname = usePathname();
  const isBuilding = pathname.endsWith('/plans/new');
  const { data } = usePlans(fieldId);
  const hasNone = data?.plans.length === 0;
  // An empty list needs no place of its own.
  if (!hasTwoPanes || isBuilding || hasNone) return children;
  return (
    <View style={{ flexDirection: 'row', width: '100%', flexGrow: 1 }}>
      <View style={{ borderRightWidth: 1, borderRightColor: tokens.hairline }}>
        <View
          role="complementary"
          aria-label="Plans"
          style={{
            width: LIST_WIDTH,
            position: 'sticky' as 'relative',
            top: 0,
            maxHeight: '100vh' as '100%',
            overflow: 'auto' as 'scroll',
            paddingTop: SPACE.four,
            paddingHorizontal: SPACE.two,
            gap: SPACE.two,
          }}
        >
          <ListHead fieldId={fieldId} level={pathname.endsWith('/plans') ? 1 : 2} />
          <PlanList fieldId={fieldId} />
        </View>
      </View>
      <View style={{ flex: 1, minWidth: 0 }}>{children}</View>
    </View>
  );
}

function ListHead({ fieldId, level }: { fieldId: string; level: 1 | 2 }) {
  const router = useRouter();
  const { data } = usePlans(fieldId);
  return (
    <View style={{ gap: SPACE.two }}>
      <Words size="title" weight="medium" level={level} style={{ paddingHorizontal: SPACE.one }}>
        Plans
      </Words>
      {data?.can.buildPlan && data.plans.length > 0 && (
        <Button
          kind="main"
          icon="plus"
          onPress={() => router.push({ pathname: '/fields/[fieldId]/plans/new', params: { fieldId } })}
        >
          Build a plan
        </Button>
      )}
    </View>
  );
}
