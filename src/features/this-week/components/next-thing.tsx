import { View } from 'react-native';

import { useJob } from '../../../api/jobs';
import type { FieldWeek } from '../../../contract/fields';
import { isOpenJob } from '../../../lib/words';
import { Icon } from '../../../ui/icon';
import { JobProgress } from '../../../ui/job/job-progress';
import { PressLink } from '../../../ui/press-link';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

/** What waits for the signed-in person, before everything else. */
export function NextThing({ week }: { week: FieldWeek }) {
  const tokens = useTokens();
  const { field, runningJobId } = week;
  if (runningJobId) return <RunningJob fieldId={field.id} jobId={runningJobId} />;
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.one }}>
      <Icon name={field.waitsForMe ? 'clock' : 'check'} color={tokens.primary} />
      <Words size="lead" tone="primary" weight="medium" style={{ flexShrink: 1 }}>
        {field.waitsForMe ?? 'Nothing waits for you.'}
      </Words>
    </View>
  );
}

function RunningJob({ fieldId, jobId }: { fieldId: string; jobId: string }) {
  const { data: job } = useJob(fieldId, jobId);
  const tokens = useTokens();
  if (!job || !isOpenJob(job.state)) return null;
  return (
    <View style={{ gap: SPACE.one }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', columnGap: SPACE.two }}>
        <Words size="lead" tone="primary" weight="medium">
          A plan is being computed
        </Words>
        {job.planId && (
          <PressLink
            href={{ pathname: '/fields/[fieldId]/plans/[planId]', params: { fieldId, planId: job.planId } }}
            style={{ flexDirection: 'row', alignItems: 'center', paddingHorizontal: SPACE.one }}
          >
            <Words weight="medium">Open it</Words>
            <Icon name="right" size={20} color={tokens.ink} />
          </PressLink>
        )}
      </View>
      <JobProgress job={job} />
    </View>
  );
}
