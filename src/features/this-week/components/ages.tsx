import type { FieldWeek } from '../../../contract/fields';
import { ago, momentName, significant, weekdayName } from '../../../lib/format';
import { useNow } from '../../../lib/use-now';
import { Words } from '../../../ui/words';

/** How old what is on the screen is, and what it is counted against. */
export function Ages({ week }: { week: FieldWeek }) {
  const nowAt = useNow();
  const { newestReadingAt, newestEventAt, backgroundEventsPerYear, completenessMagnitude, field } = week;
  const readings =
    newestReadingAt === null
      ? 'No rates have been metered yet.'
      : `Newest metered rates: week of ${weekdayName(newestReadingAt, field.timeZone)}.`;
  const events =
    newestEventAt === null
      ? 'No earthquake has been located yet.'
      : `Newest earthquake: ${momentName(newestEventAt, field.timeZone)}, ${ago(newestEventAt, nowAt)}.`;
  return (
    <Words tone="quiet" style={{ maxWidth: 720 }}>
      {readings} {events} Background: {significant(backgroundEventsPerYear)} earthquakes of M ≥{' '}
      {completenessMagnitude.toFixed(1)} a year.
    </Words>
  );
}
