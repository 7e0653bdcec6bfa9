import { useLocalSearchParams, useRouter } from 'expo-router';
import { View } from 'react-native';

import type { PlanResult } from '../../../contract/plans';
import { bar, barValue, inWords, weekName } from '../../../lib/format';
import { useWidth } from '../../../lib/use-width';
import { Chart } from '../../../ui/chart/chart';
import type { ChartTable, Series } from '../../../ui/chart/series';
import { Choice } from '../../../ui/form/choice';
import { SPACE, useTokens, type Tokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { roomSentence } from '../pressure-room';

type Well = PlanResult['wells'][number];

/** One well at a time, against its limits; which one is part of the address. */
export function PressureChart({ result, timeZone }: { result: PlanResult; timeZone: string }) {
  const tokens = useTokens();
  const router = useRouter();
  const { isRoomy } = useWidth();
  const { well: asked } = useLocalSearchParams<{ well?: string }>();
  const well = result.wells.find((candidate) => candidate.name === asked) ?? result.wells[0];
  if (!well) return null;
  return (
    <View style={{ gap: SPACE.two }}>
      <Choice
        label="Well"
        value={well.name}
        options={result.wells.map(({ name }) => ({ value: name, name }))}
        onChange={(name) => router.setParams({ well: name })}
      />
      <Words style={{ maxWidth: 720 }}>{roomSentence(result, well)}</Words>
      <Chart
        key={well.name}
        label={`Bottom-hole pressure of ${well.name}`}
        summary={roomSentence(result, well)}
        series={seriesOf(result, well, tokens)}
        weeks={result.weeks.map((week) => week.startsAt)}
        table={tableOf(result, well, timeZone)}
        timeZone={timeZone}
        unit=""
        height={220}
        labelRoom={isRoomy ? 112 : 76}
      >
        <Words size="small" tone="quiet">
          bar. The band holds the lowest and highest pressure within each week, the line its end.
        </Words>
      </Chart>
    </View>
  );
}

function seriesOf(result: PlanResult, well: Well, tokens: Tokens): Series[] {
  const color = well.kind === 'producer' ? tokens.ember : tokens.primary;
  const weeks = result.weeks.flatMap((week) => {
    const state = week.wells.find((candidate) => candidate.name === well.name);
    return state ? [{ at: week.startsAt, state }] : [];
  });
  const limits: Series[] = [
    ...(well.maxPressurePa === null ? [] : [limit(barValue(well.maxPressurePa), 'highest allowed', tokens)]),
    ...(well.minPressurePa === null ? [] : [limit(barValue(well.minPressurePa), 'lowest allowed', tokens)]),
  ];
  return [
    ...limits,
    {
      kind: 'band',
      color,
      points: weeks.map(({ at, state }) => ({
        at,
        low: barValue(state.bottomHoleMinPa),
        high: barValue(state.bottomHoleMaxPa),
      })),
    },
    {
      kind: 'line',
      color,
      width: 2.5,
      label: well.name,
      points: weeks.map(({ at, state }) => ({ at, value: barValue(state.bottomHoleEndPa) })),
    },
  ];
}

const limit = (value: number, label: string, tokens: Tokens): Series => ({
  kind: 'level',
  value,
  label,
  color: tokens.ink,
  dash: '6 4',
});

function tableOf(result: PlanResult, well: Well, timeZone: string): ChartTable {
  const rows = result.weeks.map((week) => {
    const state = week.wells.find((candidate) => candidate.name === well.name);
    if (!state) return [weekName(week.startsAt, timeZone), '–', '–', '–'];
    const texts = [state.bottomHoleMinPa, state.bottomHoleMaxPa, state.bottomHoleEndPa].map((pressurePa) =>
      inWords(bar(pressurePa)),
    );
    return [weekName(week.startsAt, timeZone), ...texts];
  });
  return { columns: ['Week', 'Lowest', 'Highest', 'At its end'], rows };
}
