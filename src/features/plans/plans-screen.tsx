import { useRouter } from 'expo-router';

import { useMe } from '../../session/session-provider';
import { useWidth } from '../../lib/use-width';
import { Button } from '../../ui/button';
import { Screen } from '../../ui/layout/screen';
import { Empty } from '../../ui/layout/states';
import { Words } from '../../ui/words';
import { PlanList } from './components/plan-list';
import { PlanScreen } from './plan-screen';
import { usePlans } from './queries';

/** The list on a phone; on a wide screen, beside the list, its newest plan. */
export function PlansScreen({ fieldId }: { fieldId: string }) {
  const { hasTwoPanes } = useWidth();
  const router = useRouter();
  const { data } = usePlans(fieldId);
  const fieldName = useMe()?.memberships.find((membership) => membership.fieldId === fieldId)?.fieldName;
  const newest = data?.plans[0];
  if (hasTwoPanes && newest) {
    return <PlanScreen key={newest.id} fieldId={fieldId} planId={newest.id} level={2} />;
  }
  const build = (
    <Button
      kind="main"
      icon="plus"
      onPress={() => router.push({ pathname: '/fields/[fieldId]/plans/new', params: { fieldId } })}
    >
      Build a plan
    </Button>
  );
  return (
    <Screen title="Plans" of={fieldName} action={data?.can.buildPlan && newest ? build : undefined}>
      {data?.plans.length === 0 ? (
        <Empty title="No plan has been built yet">
          <Words tone="quiet" align="center" style={{ maxWidth: 420 }}>
            {data.can.buildPlan
              ? 'Say which weeks and how much heat; the plan that keeps the ground quietest is computed for you.'
              : 'A field engineer builds the plans; they will stand here.'}
          </Words>
          {data.can.buildPlan && build}
        </Empty>
      ) : (
        !hasTwoPanes && <PlanList fieldId={fieldId} />
      )}
    </Screen>
  );
}
