import type { PlanResult } from '../../../contract/plans';
import {
  inWords,
  megawattHours,
  percent,
  THIN_SPACE,
  weekName,
  wholeMegawattHours,
} from '../../../lib/format';
import { useWidth } from '../../../lib/use-width';
import { Chart } from '../../../ui/chart/chart';
import type { ChartTable, Series } from '../../../ui/chart/series';
import { useTokens, type Tokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { planWeeksOf, weeksShortOfTarget } from '../sentences';

/** What the plan delivers inside the band between target and ceiling. */
export function EnergyChart({ result, timeZone }: { result: PlanResult; timeZone: string }) {
  const tokens = useTokens();
  const { isRoomy } = useWidth();
  const weeks = planWeeksOf(result);
  const short = weeksShortOfTarget(result);
  return (
    <Chart
      label="Energy per week against target"
      summary={short.length === 0 ? 'Every week meets its target.' : `${short.length} weeks fall short.`}
      series={seriesOf(result, tokens)}
      weeks={weeks.map((week) => week.startsAt)}
      table={tableOf(result, timeZone)}
      timeZone={timeZone}
      unit=""
      height={200}
      labelRoom={isRoomy ? 84 : 64}
    >
      <Words size="small" tone="quiet">
        MWh per week. The band reaches from the target to the most that may be delivered.
      </Words>
    </Chart>
  );
}

function seriesOf(result: PlanResult, tokens: Tokens): Series[] {
  const weeks = planWeeksOf(result);
  const value = (joule: number) => megawattHours(joule);
  const withTarget = weeks.filter((week) => week.heatTargetJ !== null);
  const line = withTarget.map((week) => ({ at: week.startsAt, value: value(week.heatTargetJ ?? 0) }));
  const band = withTarget.map((week) => ({
    at: week.startsAt,
    low: value(week.heatTargetJ ?? 0),
    high: value(week.heatCeilingJ ?? week.heatTargetJ ?? 0),
  }));
  return [
    { kind: 'band', points: band, color: tokens.ember, shape: 'steps', opacity: 0.18 },
    { kind: 'line', points: line, color: tokens.ink, shape: 'steps', width: 1.5, label: 'target' },
    {
      kind: 'line',
      points: weeks.map((week) => ({ at: week.startsAt, value: value(week.heatJ) })),
      color: tokens.ember,
      shape: 'steps',
      width: 3,
      label: 'this plan',
    },
  ];
}

function tableOf(result: PlanResult, timeZone: string): ChartTable {
  const rows = planWeeksOf(result).map((week) => [
    weekName(week.startsAt, timeZone),
    `${wholeMegawattHours(week.heatJ)}${THIN_SPACE}MWh`,
    week.heatTargetJ === null ? '–' : `${wholeMegawattHours(week.heatTargetJ)}${THIN_SPACE}MWh`,
    week.heatCeilingJ === null ? '–' : `${wholeMegawattHours(week.heatCeilingJ)}${THIN_SPACE}MWh`,
    week.heatTargetJ === null ? '–' : inWords(percent(week.heatJ / week.heatTargetJ, 4)),
  ]);
  return { columns: ['Week', 'This plan', 'Target', 'At most', 'Of target'], rows };
}
