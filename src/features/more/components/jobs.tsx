import { View } from 'react-native';

import { useJob, useJobs } from '../../../api/jobs';
import type { Job } from '../../../contract/jobs';
import { momentName } from '../../../lib/format';
import { isOpenJob, JOB_STATE_NAMES } from '../../../lib/words';
import { Icon, type IconName } from '../../../ui/icon';
import { JobProgress } from '../../../ui/job/job-progress';
import { Section } from '../../../ui/layout/section';
import { Failed, Loading } from '../../../ui/layout/states';
import { PressLink } from '../../../ui/press-link';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

const SHAPES: Record<Job['state'], IconName> = {
  queued: 'clock',
  running: 'clock',
  done: 'check',
  failed: 'alert',
  cancelled: 'close',
};

/** What runs and what ran: progress, the way to stop it, why it failed. */
export function Jobs({ fieldId }: { fieldId: string }) {
  const { data: jobs, error, refetch } = useJobs(fieldId);
  return (
    <Section title="Jobs" intro="Plans that are being computed, and those that were.">
      {jobs ? (
        <View role="list">
          {jobs.map((job, index) => (
            <JobRow key={job.id} job={job} isFirst={index === 0} />
          ))}
          {jobs.length === 0 && <Words tone="quiet">Nothing has been computed yet.</Words>}
        </View>
      ) : error ? (
        <Failed what="The jobs" error={error} retry={() => void refetch()} />
      ) : (
        <Loading what="the jobs" />
      )}
    </Section>
  );
}

function JobRow({ job, isFirst }: { job: Job; isFirst: boolean }) {
  const tokens = useTokens();
  const { fieldId, planId } = job;
  return (
    <View
      role="listitem"
      style={{
        paddingVertical: SPACE.small,
        gap: SPACE.one,
        borderTopWidth: isFirst ? 0 : 1,
        borderTopColor: tokens.hairline,
      }}
    >
      <View style={{ flexDirection: 'row', gap: SPACE.small, alignItems: 'center' }}>
        <Icon name={SHAPES[job.state]} color={job.state === 'failed' ? tokens.danger : tokens.primary} />
        <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>
          <Words weight="medium">{JOB_STATE_NAMES[job.state]}</Words>
          <Words size="small" tone="quiet">
            Plan asked for by {job.requestedBy.name}, {momentName(job.createdAt)}
          </Words>
        </View>
        {planId && (
          <PressLink
            href={{ pathname: '/fields/[fieldId]/plans/[planId]', params: { fieldId, planId } }}
            style={{ flexDirection: 'row', alignItems: 'center', paddingHorizontal: SPACE.one }}
          >
            <Words weight="medium">Open</Words>
            <Icon name="right" size={20} color={tokens.quiet} />
          </PressLink>
        )}
      </View>
      {isOpenJob(job.state) && <Followed fieldId={fieldId} jobId={job.id} />}
      {job.failure && (
        <View style={{ gap: SPACE.half }}>
          {[job.failure.message, ...job.failure.details].map((sentence) => (
            <Words key={sentence} tone="quiet">
              {sentence}
            </Words>
          ))}
        </View>
      )}
    </View>
  );
}

function Followed({ fieldId, jobId }: { fieldId: string; jobId: string }) {
  const { data: job } = useJob(fieldId, jobId);
  return job && isOpenJob(job.state) ? <JobProgress job={job} /> : null;
}
