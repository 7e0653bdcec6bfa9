import { View } from 'react-native';

import { useJob } from '../../../api/jobs';
import type { PlanDetail } from '../../../contract/plans';
import { Failed, Loading } from '../../../ui/layout/states';
import { JobProgress } from '../../../ui/job/job-progress';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { RequestFacts } from './request-facts';

/** While it is being computed. */
export function PlanRunning({
  fieldId,
  jobId,
  detail,
}: {
  fieldId: string;
  jobId: string;
  detail: PlanDetail;
}) {
  const { data: job, error, refetch } = useJob(fieldId, jobId);
  if (!job) {
    return error ? (
      <Failed what="The job" error={error} retry={() => void refetch()} />
    ) : (
      <Loading what="the job" />
    );
  }
  return (
    <View style={{ gap: SPACE.three }}>
      <Words size="title" weight="medium" level={2}>
        The plan is being computed
      </Words>
      <JobProgress job={job} />
      <Words tone="quiet" style={{ maxWidth: 640 }}>
        You can leave this page: the work goes on, and the plan will be here.
      </Words>
      <RequestFacts detail={detail} />
    </View>
  );
}
