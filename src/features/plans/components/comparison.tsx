import { View } from 'react-native';

import type { PlanResult } from '../../../contract/plans';
import { heat, inWords, multiple, significant } from '../../../lib/format';
import { DataTable } from '../../../ui/table/data-table';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { planWeeksOf, weeksShortOfTarget } from '../sentences';

interface Option {
  name: string;
  rateMultiple: number;
  expectedEvents: number;
  heatJ: number;
  meetsTargets: boolean;
  breaks: string[];
}

/** The plan beside the two things that people would do without one. */
export function Comparison({ result }: { result: PlanResult }) {
  const options = optionsOf(result);
  return (
    <View style={{ gap: SPACE.two }}>
      <DataTable
        label="This plan against other ways to run the wells"
        columns={[
          { key: 'what', title: 'Plan and look-ahead', width: 104 },
          ...options.map(({ name }) => ({ key: name, title: name, width: 84, align: 'right' as const })),
        ]}
        rows={[
          row('× background', options, (option) => inWords(multiple(option.rateMultiple)), true),
          row('Expected earthquakes', options, (option) => significant(option.expectedEvents)),
          row('Heat in plan weeks', options, (option) => inWords(heat(option.heatJ))),
          row('Energy target', options, (option) => (option.meetsTargets ? 'met' : 'missed')),
          row('Limits', options, (option) =>
            option.breaks.length === 0 ? 'all kept' : `breaks ${option.breaks.length}`,
          ),
        ]}
      />
      {options
        .filter((option) => option.breaks.length > 0)
        .map((option) => (
          <View key={option.name} style={{ gap: SPACE.half, maxWidth: 760 }}>
            <Words weight="medium" level={3}>
              What “{option.name.toLowerCase()}” breaks
            </Words>
            <View role="list">
              {option.breaks.map((sentence) => (
                <View key={sentence} role="listitem">
                  <Words tone="quiet">{sentence}</Words>
                </View>
              ))}
            </View>
          </View>
        ))}
      {!result.comparison.evenSplit && (
        <Words tone="quiet">There is no even split to compare with in this field.</Words>
      )}
    </View>
  );
}

const row = (name: string, options: Option[], cell: (option: Option) => string, isStrong = false) => ({
  key: name,
  isStrong,
  cells: [name, ...options.map(cell)],
});

function optionsOf(result: PlanResult): Option[] {
  const weeks = planWeeksOf(result).length;
  const { hold, evenSplit } = result.comparison;
  const other = (name: string, alternative: typeof hold): Option => ({
    name,
    rateMultiple: alternative.rateMultiple,
    expectedEvents: alternative.expectedEvents,
    heatJ: alternative.weeklyHeatJ.slice(0, weeks).reduce((sum, heatJ) => sum + heatJ, 0),
    meetsTargets: alternative.meetsTargets,
    breaks: alternative.breaks,
  });
  return [
    {
      name: 'This plan',
      rateMultiple: result.totals.rateMultiple,
      expectedEvents: result.totals.expectedEvents,
      heatJ: result.planWeeks.heatJ,
      meetsTargets: weeksShortOfTarget(result).length === 0,
      breaks: [],
    },
    other('Hold today’s rates', hold),
    ...(evenSplit ? [other('Split evenly', evenSplit)] : []),
  ];
}
