import { usePlan } from '../../api/plans';
import type { PlanDetail } from '../../contract/plans';
import { counted, weekdayName } from '../../lib/format';
import { useWidth } from '../../lib/use-width';
import { isOpenJob, PLAN_STATE_NAMES } from '../../lib/words';
import { useMe } from '../../session/session-provider';
import { BackLink } from '../../ui/layout/back-link';
import { Screen } from '../../ui/layout/screen';
import { Failed, Loading } from '../../ui/layout/states';
import { PlanEnded } from './components/plan-ended';
import { PlanRecord } from './components/plan-record';
import { PlanRunning } from './components/plan-running';
import { PlanView } from './components/plan-view';

interface PlanScreenProps {
  fieldId: string;
  planId: string;
  /** 2 beside the list of plans, whose page it is then. */
  level?: 1 | 2;
}

export function PlanScreen({ fieldId, planId, level }: PlanScreenProps) {
  const { data: detail, error, refetch } = usePlan(fieldId, planId);
  const { hasTwoPanes } = useWidth();
  const fieldName = useMe()?.memberships.find((membership) => membership.fieldId === fieldId)?.fieldName;
  const back = hasTwoPanes ? undefined : (
    <BackLink href={{ pathname: '/fields/[fieldId]/plans', params: { fieldId } }}>Plans</BackLink>
  );
  if (!detail) {
    return (
      <Screen title="Plan" of={fieldName} above={back} level={level}>
        {error ? (
          <Failed what="The plan" error={error} retry={() => void refetch()} />
        ) : (
          <Loading what="the plan" />
        )}
      </Screen>
    );
  }
  return (
    <Screen title={detail.plan.name} of={fieldName} above={back} intro={introOf(detail)} level={level}>
      <PlanBody fieldId={fieldId} detail={detail} />
      <PlanRecord fieldId={fieldId} detail={detail} />
    </Screen>
  );
}

function PlanBody({ fieldId, detail }: { fieldId: string; detail: PlanDetail }) {
  const { jobId, jobState } = detail.plan;
  if (detail.result) return <PlanView detail={detail} result={detail.result} />;
  if (!jobId || !jobState) return null;
  if (isOpenJob(jobState)) return <PlanRunning fieldId={fieldId} jobId={jobId} detail={detail} />;
  return <PlanEnded fieldId={fieldId} jobId={jobId} detail={detail} />;
}

function introOf({ plan, timeZone }: PlanDetail): string {
  const weeks = `${counted(plan.weeks, 'week')} from ${weekdayName(plan.firstWeekStartsAt, timeZone)}`;
  return `Plan ${plan.number} · ${PLAN_STATE_NAMES[plan.state]} · ${weeks}`;
}
