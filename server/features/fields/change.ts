import type { PastWeek } from './service';

const counted = (count: number) =>
  count === 0 ? 'no earthquakes were' : count === 1 ? 'one earthquake was' : `${count} earthquakes were`;

/** What changed in the newest complete week against the one before it, as one sentence. */
export function changeSentence(weeks: PastWeek[]): string {
  const last = weeks.at(-1);
  const before = weeks.at(-2);
  if (!last) return 'Nothing has been measured yet.';
  if (!before) return `In the first measured week ${counted(last.observedEvents)} located.`;
  return `Last week ${counted(last.observedEvents)} located (${before.observedEvents} the week before), and ${heatChange(last.heatJ, before.heatJ)}.`;
}

function heatChange(nowJ: number, beforeJ: number): string {
  if (beforeJ === 0) return nowJ === 0 ? 'no heat was delivered' : 'heat was delivered again';
  const percent = ((nowJ - beforeJ) / beforeJ) * 100;
  if (Math.abs(percent) < 0.05) return 'the heat delivered stayed the same';
  return `the heat delivered ${percent > 0 ? 'rose' : 'fell'} by ${Math.abs(percent).toFixed(1)} %`;
}
