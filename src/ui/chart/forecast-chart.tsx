import type { PlanResult } from '../../contract/plans';
import { inWords, multiple, weekName } from '../../lib/format';
import { useNow } from '../../lib/use-now';
import { useWidth } from '../../lib/use-width';
import { useTokens, type Tokens } from '../theme';
import { Words } from '../words';
import { Chart } from './chart';
import type { ChartTable, Series, WeekPoint } from './series';

interface PastWeek {
  weekStartsAt: number;
  observedEvents: number;
  rateMultiple: number;
}

interface ForecastChartProps {
  pastWeeks: PastWeek[];
  result: PlanResult | null;
  timeZone: string;
  height?: number;
}

/** Counts of a few a week scatter; their mean over this many shows where they go. */
const MEAN_OVER_WEEKS = 8;

/** The still line: what was observed, what the plan forecasts, what holding today's rates would. */
export function ForecastChart({ pastWeeks, result, timeZone, height = 260 }: ForecastChartProps) {
  const tokens = useTokens();
  const nowAt = useNow();
  const { isRoomy } = useWidth();
  const shownPast = isRoomy ? pastWeeks : pastWeeks.slice(-13);
  const weeks = [
    ...shownPast.map((week) => week.weekStartsAt),
    ...(result?.weeks.map((week) => week.startsAt) ?? []),
  ];
  if (weeks.length === 0) return <Words tone="quiet">Nothing has been measured or forecast yet.</Words>;
  return (
    <Chart
      label="Rate of earthquakes against background"
      summary={summaryOf(result)}
      series={seriesOf(pastWeeks, shownPast.length, result, tokens, isRoomy)}
      weeks={weeks}
      table={tableOf(shownPast, result, timeZone)}
      timeZone={timeZone}
      unit="×"
      floor={0}
      height={height}
      todayAt={nowAt}
      labelRoom={isRoomy ? 108 : 84}
      startIndex={result ? shownPast.length : weeks.length - 1}
    >
      <Words size="small" tone="quiet">
        Dots: earthquakes counted in a week; ink line: their {MEAN_OVER_WEEKS}-week mean. 1 × is the
        background rate.
        {result?.weeks.some((week) => week.lookAhead) ? ' Dashed: the look-ahead, last rates held.' : ''}
      </Words>
    </Chart>
  );
}

function seriesOf(
  pastWeeks: PastWeek[],
  shown: number,
  result: PlanResult | null,
  tokens: Tokens,
  isRoomy: boolean,
): Series[] {
  const observed = pastWeeks.map((week) => ({ at: week.weekStartsAt, value: week.rateMultiple }));
  const firstShownAt = observed.at(-shown)?.at ?? 0;
  const isShown = ({ at }: WeekPoint) => at >= firstShownAt;
  const still: Series = {
    kind: 'level',
    value: 1,
    color: tokens.primary,
    width: 2,
    label: 'background',
  };
  const past: Series[] = [
    { kind: 'dots', points: observed.filter(isShown), color: tokens.quiet },
    {
      kind: 'line',
      points: runningMean(observed).filter(isShown),
      color: tokens.ink,
      width: 2,
      shape: 'curve',
    },
  ];
  if (!result) return [still, ...past];
  const forecast = result.weeks.map((week) => ({ at: week.startsAt, value: week.rateMultiple }));
  const planned = result.weeks.filter((week) => !week.lookAhead).length;
  const hold = result.comparison.hold.weeklyRateMultiple.flatMap((value, index) => {
    const at = result.weeks[index]?.startsAt;
    return at === undefined ? [] : [{ at, value }];
  });
  const lastPlanned = Math.max(0, planned - 1);
  const ahead = forecast.slice(lastPlanned);
  return [
    still,
    ...past,
    {
      kind: 'line',
      points: hold,
      color: tokens.quiet,
      width: 1.5,
      shape: 'curve',
      label: isRoomy ? 'hold today’s rates' : 'hold rates',
    },
    {
      kind: 'line',
      points: forecast.slice(0, planned),
      color: tokens.plum,
      width: 3,
      shape: 'curve',
      label: ahead.length > 1 ? undefined : 'this plan',
    },
    ...(ahead.length > 1
      ? [
          {
            kind: 'line' as const,
            points: ahead,
            color: tokens.plum,
            width: 2,
            dash: '2 5',
            shape: 'curve' as const,
            label: 'this plan',
          },
        ]
      : []),
  ];
}

/** The mean of each week and those before it; weeks without a full count behind them have none. */
function runningMean(points: WeekPoint[]): WeekPoint[] {
  return points.slice(MEAN_OVER_WEEKS - 1).map(({ at }, index) => {
    const window = points.slice(index, index + MEAN_OVER_WEEKS);
    return { at, value: window.reduce((sum, point) => sum + point.value, 0) / window.length };
  });
}

function tableOf(pastWeeks: PastWeek[], result: PlanResult | null, timeZone: string): ChartTable {
  const past = pastWeeks.map((week) => [
    weekName(week.weekStartsAt, timeZone),
    `${inWords(multiple(week.rateMultiple))} (${week.observedEvents})`,
    '–',
    '–',
  ]);
  const ahead = (result?.weeks ?? []).map((week, index) => {
    const hold = result?.comparison.hold.weeklyRateMultiple[index];
    return [
      weekName(week.startsAt, timeZone),
      '–',
      inWords(multiple(week.rateMultiple)),
      hold === undefined ? '–' : inWords(multiple(hold)),
    ];
  });
  return {
    columns: ['Week', 'Observed (count)', 'This plan', 'Hold today’s rates'],
    rows: [...past, ...ahead],
  };
}

function summaryOf(result: PlanResult | null): string {
  if (!result) return 'Observed weekly earthquakes against the background rate.';
  const { planWeeks, comparison } = result;
  return `The plan forecasts ${inWords(multiple(planWeeks.rateMultiple))} of background over its weeks; holding today's rates ${inWords(multiple(comparison.hold.rateMultiple))} over the whole horizon.`;
}
