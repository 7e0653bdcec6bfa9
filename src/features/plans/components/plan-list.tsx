import { usePathname } from 'expo-router';
import { View } from 'react-native';

import { useFieldTimeZone } from '../../../api/fields';
import type { PlanSummary } from '../../../contract/plans';
import { counted, inWords, multiple, percent, weekName } from '../../../lib/format';
import { isOpenJob, JOB_STATE_NAMES, PLAN_STATE_NAMES } from '../../../lib/words';
import { Failed, Loading } from '../../../ui/layout/states';
import { PressLink } from '../../../ui/press-link';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { usePlans } from '../queries';
import { StateMark } from './state-mark';

/** Newest first; each leads to its plan. */
export function PlanList({ fieldId }: { fieldId: string }) {
  const { data, error, refetch } = usePlans(fieldId);
  const { data: timeZone } = useFieldTimeZone(fieldId);
  const pathname = usePathname();
  if (!data || timeZone === undefined) {
    return error ? (
      <Failed what="The plans" error={error} retry={() => void refetch()} />
    ) : (
      <Loading what="the plans" />
    );
  }
  const isList = pathname.endsWith('/plans');
  return (
    <View role="list">
      {data.plans.map((plan, index) => (
        <PlanRow
          key={plan.id}
          fieldId={fieldId}
          plan={plan}
          timeZone={timeZone}
          isCurrent={pathname.endsWith(`/${plan.id}`) || (isList && index === 0)}
        />
      ))}
    </View>
  );
}

interface PlanRowProps {
  fieldId: string;
  plan: PlanSummary;
  timeZone: string;
  isCurrent: boolean;
}

function PlanRow({ fieldId, plan, timeZone, isCurrent }: PlanRowProps) {
  return (
    <View role="listitem">
      <PressLink
        href={{ pathname: '/fields/[fieldId]/plans/[planId]', params: { fieldId, planId: plan.id } }}
        current={isCurrent}
        style={{ paddingVertical: SPACE.small, paddingHorizontal: SPACE.one, gap: 2 }}
      >
        <View style={{ flexDirection: 'row', justifyContent: 'space-between', gap: SPACE.one }}>
          <Words weight="medium" style={{ flexShrink: 1 }}>
            {plan.number}. {plan.name}
          </Words>
          <StateMark state={stateOf(plan)} />
        </View>
        <Words tone="quiet">
          {counted(plan.weeks, 'week')} from {weekName(plan.firstWeekStartsAt, timeZone)} ·{' '}
          {plan.builtBy.name}
        </Words>
        {plan.outcome && (
          <Words tabular>
            <Words tone="plum" weight="medium">
              {inWords(multiple(plan.outcome.rateMultiple))}
            </Words>{' '}
            background ·{' '}
            <Words tone="ember" weight="medium">
              {inWords(percent(plan.outcome.heatJ / plan.outcome.heatTargetJ))}
            </Words>{' '}
            of target
          </Words>
        )}
      </PressLink>
    </View>
  );
}

function stateOf(plan: PlanSummary): string {
  const isWithdrawn = plan.state === 'withdrawn';
  if (isWithdrawn || plan.jobState === null || plan.jobState === 'done') return PLAN_STATE_NAMES[plan.state];
  return isOpenJob(plan.jobState) ? 'Computing' : JOB_STATE_NAMES[plan.jobState];
}
