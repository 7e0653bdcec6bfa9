import { useRouter } from 'expo-router';
import { View } from 'react-native';

import { useJob } from '../../../api/jobs';
import type { PlanDetail } from '../../../contract/plans';
import { Button } from '../../../ui/button';
import { Icon } from '../../../ui/icon';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { RequestFacts } from './request-facts';

/** There is no plan: why, and what to do about it. */
export function PlanEnded({
  fieldId,
  jobId,
  detail,
}: {
  fieldId: string;
  jobId: string;
  detail: PlanDetail;
}) {
  const tokens = useTokens();
  const router = useRouter();
  const { data: job } = useJob(fieldId, jobId);
  const wasCancelled = detail.plan.jobState === 'cancelled';
  const failure = job?.failure;
  return (
    <View style={{ gap: SPACE.three }}>
      <View role={wasCancelled ? 'status' : 'alert'} style={{ gap: SPACE.one, maxWidth: 720 }}>
        <View style={{ flexDirection: 'row', gap: SPACE.one, alignItems: 'center' }}>
          <Icon name={wasCancelled ? 'close' : 'alert'} color={wasCancelled ? tokens.quiet : tokens.danger} />
          <Words size="title" weight="medium" level={2} style={{ flexShrink: 1 }}>
            {wasCancelled ? 'This plan was cancelled' : 'There is no plan'}
          </Words>
        </View>
        <Words size="lead">
          {failure?.message ??
            (wasCancelled
              ? 'It was stopped before it was computed. The request is kept.'
              : 'Loading the reason …')}
        </Words>
        {failure && failure.details.length > 0 && (
          <View role="list" style={{ paddingTop: SPACE.one }}>
            {failure.details.map((sentence) => (
              <View
                key={sentence}
                role="listitem"
                style={{ paddingVertical: SPACE.one, borderTopWidth: 1, borderTopColor: tokens.hairline }}
              >
                <Words>{sentence}</Words>
              </View>
            ))}
          </View>
        )}
      </View>
      {detail.can.buildAgain && (
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            kind="main"
            icon="again"
            onPress={() =>
              router.push({
                pathname: '/fields/[fieldId]/plans/new',
                params: { fieldId, like: detail.plan.id },
              })
            }
          >
            Build again
          </Button>
        </View>
      )}
      <RequestFacts detail={detail} />
    </View>
  );
}
