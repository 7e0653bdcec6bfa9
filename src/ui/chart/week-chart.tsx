import { useState } from 'react';
import { View } from 'react-native';

import { SPACE, useTokens } from '../theme';
import { Words } from '../words';
import { ChartLabels } from './chart-labels';
import { ReadOut } from './read-out';
import { endOf, extentOf, middleOf, niceTicks, type ChartTable, type Series } from './series';
import { WeekPlot, type Frame } from './week-plot';

export interface WeekChartProps {
  /** What a screen reader calls it. */
  label: string;
  /** One sentence with what the picture shows. */
  summary: string;
  series: Series[];
  weeks: number[];
  table: ChartTable;
  timeZone: string;
  unit: string;
  todayAt?: number;
  height?: number;
  /** Starts the axis here even if the values do not. */
  floor?: number;
  /** Room at the right for the names of the lines. */
  labelRoom?: number;
  /** The week that is read out before somebody points at one. */
  startIndex?: number;
}

const AXIS_ROOM = 48;

/** Weekly values over time, with names at the lines and a read-out for finger, mouse and keys. */
export function WeekChart(props: WeekChartProps) {
  const { series, weeks, table, height = 240, labelRoom = 96, floor, startIndex = 0 } = props;
  const isTodayShown = props.todayAt !== undefined && props.todayAt < endOf(weeks.at(-1) ?? 0);
  const todayAt = isTodayShown ? props.todayAt : undefined;
  const tokens = useTokens();
  const [width, setWidth] = useState(0);
  const [index, setIndex] = useState(startIndex);
  const chosen = Math.min(index, weeks.length - 1);
  const frame = frameOf(series, weeks, floor, width, height, labelRoom);
  return (
    <View style={{ gap: SPACE.half }}>
      <ReadOutLine table={table} index={chosen} />
      <View style={{ height }} onLayout={({ nativeEvent }) => setWidth(Math.floor(nativeEvent.layout.width))}>
        {width > 0 && (
          <>
            <WeekPlot {...props} todayAt={todayAt} frame={frame} />
            <ChartLabels series={series} frame={frame} todayAt={todayAt} />
            <ReadOut
              label={props.label}
              positions={weeks.map((at) => frame.x(middleOf(at)))}
              index={chosen}
              onChange={setIndex}
              text={readOutText(table, chosen)}
              frame={frame}
              color={tokens.quiet}
            />
          </>
        )}
      </View>
    </View>
  );
}

function ReadOutLine({ table, index }: { table: ChartTable; index: number }) {
  const [week, ...values] = table.rows[index] ?? [];
  const shown = values
    .map((value, column) => ({ name: table.columns[column + 1] ?? '', value }))
    .filter(({ value }) => value !== '–');
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: SPACE.two, minHeight: 20 }} aria-hidden>
      <Words weight="medium">Week of {week}</Words>
      {shown.map(({ name, value }) => (
        <Words key={name} tone="quiet" tabular>
          {name} <Words weight="medium">{value}</Words>
        </Words>
      ))}
    </View>
  );
}

function readOutText(table: ChartTable, index: number): string {
  const [week, ...values] = table.rows[index] ?? [];
  const parts = values.flatMap((value, column) =>
    value === '–' ? [] : [`${table.columns[column + 1]} ${value}`],
  );
  return `Week of ${week}: ${parts.join(', ')}`;
}

function frameOf(
  series: Series[],
  weeks: number[],
  floor: number | undefined,
  width: number,
  height: number,
  labelRoom: number,
): Frame {
  const [lowest, highest] = extentOf(series);
  const yTicks = niceTicks(floor === undefined ? lowest : Math.min(floor, lowest), highest, 4);
  const low = yTicks[0] ?? 0;
  const high = yTicks.at(-1) ?? 1;
  const from = weeks[0] ?? 0;
  const to = middleOf(weeks.at(-1) ?? 1);
  const padding = { top: 12, bottom: 28, left: AXIS_ROOM, right: labelRoom };
  const plotWidth = Math.max(1, width - padding.left - padding.right);
  const plotHeight = height - padding.top - padding.bottom;
  return {
    width,
    height,
    padding,
    domain: { x: [from, to], y: [low, high] },
    yTicks,
    x: (at) => padding.left + ((at - from) / (to - from || 1)) * plotWidth,
    y: (value) => padding.top + (1 - (value - low) / (high - low || 1)) * plotHeight,
  };
}
