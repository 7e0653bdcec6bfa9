import { View } from 'react-native';

import { useCancelJob } from '../../api/jobs';
import type { Job } from '../../contract/jobs';
import { about, fixed } from '../../lib/format';
import { isOpenJob } from '../../lib/words';
import { Button } from '../button';
import { SPACE } from '../theme';
import { ProgressBar } from '../progress-bar';
import { Words } from '../words';

/** How far a job is, what it does now, how long it may take, and the way to stop it. */
export function JobProgress({ job }: { job: Job }) {
  const cancelling = useCancelJob(job.fieldId);
  const isOpen = isOpenJob(job.state);
  const percentDone = Math.round(job.progress * 100);
  return (
    <View style={{ gap: SPACE.one, maxWidth: 640 }}>
      <View style={{ flexDirection: 'row', justifyContent: 'space-between', gap: SPACE.two }}>
        <Words weight="medium" live="polite" style={{ flexShrink: 1 }}>
          {job.step}
        </Words>
        <Words tone="quiet" tabular>
          {fixed(percentDone, 0)} %
        </Words>
      </View>
      <ProgressBar percentDone={percentDone} />
      <View
        style={{
          flexDirection: 'row',
          alignItems: 'center',
          justifyContent: 'space-between',
          gap: SPACE.two,
        }}
      >
        <Words tone="quiet" tabular>
          {timeLeft(job)}
        </Words>
        {isOpen && job.can.cancel && (
          <Button icon="close" onPress={() => cancelling.mutate(job.id)} busy={cancelling.isPending}>
            Cancel
          </Button>
        )}
      </View>
      {cancelling.error && (
        <Words tone="danger" role="alert">
          {cancelling.error.message}
        </Words>
      )}
    </View>
  );
}

function timeLeft(job: Job): string {
  if (job.state === 'queued') return 'It starts when the one before it is done.';
  if (job.secondsLeft === null) return 'Measuring how long it takes …';
  return `${about(job.secondsLeft)} left`.replace(/^a/, 'A');
}
