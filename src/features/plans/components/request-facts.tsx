import type { PlanDetail } from '../../../contract/plans';
import { counted, inWords, percent, THIN_SPACE, weekdayName, wholeMegawattHours } from '../../../lib/format';
import { Facts } from '../../../ui/facts';
import { Section } from '../../../ui/layout/section';

/** What was asked for. */
export function RequestFacts({ detail }: { detail: PlanDetail }) {
  const { request, timeZone } = detail;
  const facts = [
    { name: 'First week', value: weekdayName(request.firstWeekStartsAt, timeZone) },
    {
      name: 'Weeks',
      value: `${counted(request.weeks, 'week')}, then ${counted(request.lookAheadWeeks, 'week')} of look-ahead`,
    },
    { name: 'Energy per week', value: targetsInWords(request.heatTargetJPerWeek) },
    { name: 'Allowed over-delivery', value: inWords(percent(request.heatBand)) },
    ...(request.notes ? [{ name: 'Notes', value: request.notes }] : []),
  ];
  return (
    <Section title="What was asked for">
      <Facts facts={facts} />
    </Section>
  );
}

function targetsInWords(targets: number[]): string {
  const texts = [...new Set(targets.map(wholeMegawattHours))];
  const lowest = wholeMegawattHours(Math.min(...targets));
  const highest = wholeMegawattHours(Math.max(...targets));
  return texts.length === 1 ? `${lowest}${THIN_SPACE}MWh` : `${lowest} to ${highest}${THIN_SPACE}MWh`;
}
