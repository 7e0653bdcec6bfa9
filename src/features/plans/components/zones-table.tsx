import type { PlanResult } from '../../../contract/plans';
import { inWords, multiple, significant, weekName } from '../../../lib/format';
import { DataTable } from '../../../ui/table/data-table';
import { planWeeksOf } from '../sentences';

/** Where the earthquakes are expected. */
export function ZonesTable({ result, timeZone }: { result: PlanResult; timeZone: string }) {
  const weeks = planWeeksOf(result);
  const names = weeks[0]?.zones.map((zone) => zone.name) ?? [];
  const rows = names.map((name) => {
    const zones = weeks.flatMap((week) =>
      week.zones.filter((zone) => zone.name === name).map((zone) => ({ ...zone, startsAt: week.startsAt })),
    );
    const expected = zones.reduce((sum, zone) => sum + zone.expectedEvents, 0);
    const rated = zones.filter((zone) => zone.rateMultiple !== null);
    const highest = rated.reduce<(typeof rated)[number] | undefined>(
      (best, zone) => (best && (best.rateMultiple ?? 0) >= (zone.rateMultiple ?? 0) ? best : zone),
      undefined,
    );
    const inMultiple = (value: number | null | undefined) => (value == null ? '–' : inWords(multiple(value)));
    return {
      key: name,
      cells: [
        name,
        significant(expected),
        inMultiple(zones[0]?.rateMultiple),
        inMultiple(zones.at(-1)?.rateMultiple),
        highest ? `${inMultiple(highest.rateMultiple)} (${weekName(highest.startsAt, timeZone)})` : '–',
      ],
    };
  });
  return (
    <DataTable
      label="Forecast by zone over the plan’s weeks"
      columns={[
        { key: 'zone', title: 'Zone', width: 132 },
        { key: 'events', title: 'Expected', width: 84, align: 'right' },
        { key: 'first', title: 'First week', width: 84, align: 'right' },
        { key: 'last', title: 'Last week', width: 84, align: 'right' },
        { key: 'highest', title: 'Highest', width: 128, align: 'right' },
      ]}
      rows={rows}
    />
  );
}
