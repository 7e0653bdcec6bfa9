import { type ReactElement } from 'react';

import { THIN_SPACE, tickText, weekName } from '../../lib/format';
import { FONT } from '../fonts';
import { useTokens } from '../theme';
import { endOf, middleOf, type Series } from './series';
import {
  VictoryArea,
  VictoryAxis,
  VictoryChart,
  VictoryContainer,
  VictoryLine,
  VictoryScatter,
} from './victory';
import { type WeekChartProps } from './week-chart';

/** Where values lie on the screen. */
export interface Frame {
  width: number;
  height: number;
  padding: { top: number; bottom: number; left: number; right: number };
  domain: { x: [number, number]; y: [number, number] };
  yTicks: number[];
  x(at: number): number;
  y(value: number): number;
}

const WEEK_LABEL_WIDTH = 58;

/** The drawing itself: axes and marks, nothing that answers. */
export function WeekPlot({
  label,
  summary,
  series,
  weeks,
  timeZone,
  unit,
  todayAt,
  frame,
}: WeekChartProps & { frame: Frame }) {
  const tokens = useTokens();
  const text = { fontFamily: FONT.regular, fontSize: 12, fill: tokens.quiet, letterSpacing: 0 };
  const { width, height, padding, domain } = frame;
  return (
    <VictoryChart
      width={width}
      height={height}
      padding={padding}
      domain={domain}
      containerComponent={<VictoryContainer responsive={false} title={label} desc={summary} />}
    >
      <VictoryAxis
        dependentAxis
        tickValues={frame.yTicks}
        tickFormat={(value: number) => tickText(value) + (unit ? THIN_SPACE + unit : '')}
        style={{
          axis: { stroke: 'none' },
          grid: { stroke: tokens.hairline, strokeWidth: 1 },
          ticks: { stroke: 'none' },
          tickLabels: { ...text, padding: 6 },
        }}
      />
      <VictoryAxis
        tickValues={spacedWeeks(weeks, frame)}
        tickFormat={(at: number) => weekName(at, timeZone)}
        orientation="bottom"
        offsetY={padding.bottom}
        style={{
          axis: { stroke: tokens.outline, strokeWidth: 1 },
          grid: { stroke: 'none' },
          ticks: { stroke: tokens.outline, size: 4 },
          tickLabels: { ...text, padding: 4 },
        }}
      />
      {todayAt !== undefined && (
        <VictoryLine
          data={domain.y.map((value) => ({ x: todayAt, y: value }))}
          style={{ data: { stroke: tokens.quiet, strokeWidth: 1, strokeDasharray: '2 3' } }}
        />
      )}
      {series.flatMap((entry, index) => marks(entry, index, weeks))}
    </VictoryChart>
  );
}

function marks(entry: Series, index: number, weeks: number[]): ReactElement[] {
  const key = `${entry.kind}-${index}`;
  if (entry.kind === 'level') {
    const ends = [weeks[0] ?? 0, middleOf(weeks.at(-1) ?? 0)];
    const stroke = { stroke: entry.color, strokeWidth: entry.width ?? 1.5, strokeDasharray: entry.dash };
    const data = ends.map((at) => ({ x: at, y: entry.value }));
    return [<VictoryLine key={key} data={data} style={{ data: stroke }} />];
  }
  if (entry.kind === 'band') {
    const points = entry.points.map(({ at, low, high }) => ({ at, y: high, y0: low }));
    const data = entry.shape === 'steps' ? stepped(points) : centred(points);
    const fill = { fill: entry.color, fillOpacity: entry.opacity ?? 0.16, stroke: 'none' };
    return [<VictoryArea key={key} data={data} style={{ data: fill }} interpolation={pathOf(entry.shape)} />];
  }
  const points = entry.points.map(({ at, value }) => ({ at, y: value }));
  if (entry.kind === 'dots') {
    const data = centred(points);
    return [<VictoryScatter key={key} data={data} size={2.5} style={{ data: { fill: entry.color } }} />];
  }
  const data = entry.shape === 'steps' ? stepped(points) : centred(points);
  const stroke = {
    stroke: entry.color,
    strokeWidth: entry.width ?? 2,
    strokeDasharray: entry.dash,
    strokeLinejoin: 'round' as const,
    strokeLinecap: 'round' as const,
  };
  return [<VictoryLine key={key} data={data} style={{ data: stroke }} interpolation={pathOf(entry.shape)} />];
}

const pathOf = (shape: 'curve' | 'steps' | undefined) =>
  shape === 'steps' ? 'stepAfter' : shape === 'curve' ? 'monotoneX' : 'linear';

const centred = <Point extends { at: number }>(points: Point[]) =>
  points.map((point) => ({ ...point, x: middleOf(point.at) }));

/** A week's value holds to its end; the last one needs a point of its own for that. */
function stepped<Point extends { at: number }>(points: Point[]) {
  const steps = points.map((point) => ({ ...point, x: point.at }));
  const last = points.at(-1);
  return last ? [...steps, { ...last, x: endOf(last.at) }] : steps;
}

/** Every so many weeks, so that their names have room. */
function spacedWeeks(weeks: number[], frame: Frame): number[] {
  const plotWidth = frame.width - frame.padding.left - frame.padding.right;
  const fit = Math.max(2, Math.floor(plotWidth / WEEK_LABEL_WIDTH));
  const every = Math.max(1, Math.ceil(weeks.length / fit));
  return weeks.filter((_at, index) => index % every === 0);
}
