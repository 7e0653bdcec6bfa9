import { Component, lazy, Suspense, useState, type ReactNode } from 'react';
import { View } from 'react-native';

import { Button } from '../button';
import { DataTable } from '../table/data-table';
import { SPACE } from '../theme';
import { Words } from '../words';
import type { WeekChartProps } from './week-chart';

/** The drawing library is large; the first screen does without it. */
const WeekChart = lazy(() => import('./week-chart').then((module) => ({ default: module.WeekChart })));

const TEXT_COLUMN = 104;

/** A chart with the table behind it. */
export function Chart(props: WeekChartProps & { children?: ReactNode }) {
  const [isTable, setIsTable] = useState(false);
  const { label, table, height = 240, children } = props;
  return (
    <View style={{ gap: SPACE.one }}>
      {isTable ? (
        <DataTable
          label={label}
          columns={table.columns.map((title, index) => ({
            key: title,
            title,
            width: TEXT_COLUMN,
            align: index === 0 ? 'left' : 'right',
          }))}
          rows={table.rows.map((cells) => ({ key: cells[0] ?? '', cells }))}
        />
      ) : (
        <ChartBoundary>
          <Suspense fallback={<View style={{ height: height + 24 }} />}>
            <WeekChart {...props} />
          </Suspense>
        </ChartBoundary>
      )}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: SPACE.one }}>
        <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 200 }}>{children}</View>
        <Button
          kind="quiet"
          icon={isTable ? 'chart' : 'table'}
          onPress={() => setIsTable(!isTable)}
          label={isTable ? `Show as chart: ${label}` : `Show as table: ${label}`}
        >
          {isTable ? 'Show as chart' : 'Show as table'}
        </Button>
      </View>
    </View>
  );
}

/** A drawing that fails must not take the page with it. */
class ChartBoundary extends Component<{ children: ReactNode }, { hasFailed: boolean }> {
  override state = { hasFailed: false };

  static getDerivedStateFromError() {
    return { hasFailed: true };
  }

  override render() {
    if (!this.state.hasFailed) return this.props.children;
    return <Words tone="quiet">The chart could not be drawn. Its numbers are in the table.</Words>;
  }
}
