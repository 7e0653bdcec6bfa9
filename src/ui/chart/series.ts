/** What a chart over weeks is made of; colours come from the theme, values are in the unit of the axis. */
export interface WeekPoint {
  /** Start of the week. */
  at: number;
  value: number;
}

export interface WeekBand {
  at: number;
  low: number;
  high: number;
}

interface Named {
  color: string;
  /** Written beside its last point. */
  label?: string;
}

export type Series =
  | (Named & { kind: 'line'; points: WeekPoint[]; width?: number; dash?: string; shape?: 'curve' | 'steps' })
  | (Named & { kind: 'dots'; points: WeekPoint[] })
  | (Named & { kind: 'band'; points: WeekBand[]; opacity?: number; shape?: 'curve' | 'steps' })
  | (Named & { kind: 'level'; value: number; width?: number; dash?: string });

/** The numbers behind a chart: the first column names the week. */
export interface ChartTable {
  columns: string[];
  rows: string[][];
}

const WEEK_MS = 7 * 86_400_000;

/** Weekly values are means over the week, so they stand in its middle. */
export const middleOf = (weekStartsAt: number): number => weekStartsAt + WEEK_MS / 2;
export const endOf = (weekStartsAt: number): number => weekStartsAt + WEEK_MS;

/** Lowest and highest value of all series. */
export function extentOf(series: readonly Series[]): [number, number] {
  const values = series.flatMap((entry) => {
    if (entry.kind === 'level') return [entry.value];
    if (entry.kind === 'band') return entry.points.flatMap(({ low, high }) => [low, high]);
    return entry.points.map(({ value }) => value);
  });
  return [Math.min(...values), Math.max(...values)];
}

/** Round ticks that enclose the values: steps of 1, 2 or 5 times a power of ten. */
export function niceTicks(low: number, high: number, count: number): number[] {
  const span = high - low || Math.abs(high) || 1;
  const raw = span / Math.max(1, count);
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((candidate) => candidate >= raw) ?? raw;
  const first = Math.floor(low / step + 1e-9);
  // A flat line has an axis too.
  const last = Math.max(first + 1, Math.ceil(high / step - 1e-9));
  return Array.from({ length: last - first + 1 }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}
