import { View } from 'react-native';

import type { PlanResult } from '../../../contract/plans';
import { litresChange, litresPerSecond, weekName } from '../../../lib/format';
import { DataTable, type Column, type Row } from '../../../ui/table/data-table';
import { SPACE } from '../../../ui/theme';
import { WellMark } from '../../../ui/well-mark';
import { Words } from '../../../ui/words';
import { planWeeksOf } from '../sentences';

type Well = PlanResult['wells'][number];
type State = Well['weeklyState'][number];

/** Short enough to stand under a number; what each means is said once below the table. */
const STATE_WORDS: Record<State, string> = {
  free: '',
  atMin: 'min',
  atMax: 'max',
  atRamp: 'ramp',
  outage: 'out',
  fixed: 'fixed',
};

const STATE_MEANINGS: Partial<Record<State, string>> = {
  atMin: 'min: at its lowest rate',
  atMax: 'max: at its highest rate',
  atRamp: 'ramp: changes as fast as it may',
  outage: 'out: not available',
  fixed: 'fixed: the plan may not move it',
};

const KIND_ORDER = { producer: 0, injector: 1, monitor: 2 };

/** Wells down, weeks across. */
export function RatesTable({ result, timeZone }: { result: PlanResult; timeZone: string }) {
  const weeks = planWeeksOf(result);
  const wells = [...result.wells].sort((a, b) => KIND_ORDER[a.kind] - KIND_ORDER[b.kind]);
  const columns: Column[] = [
    { key: 'well', title: 'Well', width: 100 },
    { key: 'last', title: 'Last', width: 56, align: 'right' },
    { key: 'change', title: 'Change', width: 62, align: 'right', note: 'wk 1' },
    ...weeks.map((week) => ({
      key: String(week.week),
      title: weekName(week.startsAt, timeZone),
      note: `wk ${week.week}`,
      width: 54,
      align: 'right' as const,
    })),
  ];
  const used = new Set(wells.flatMap((well) => well.weeklyState));
  const meanings = Object.entries(STATE_MEANINGS).flatMap(([state, text]) =>
    used.has(state as State) ? [text] : [],
  );
  return (
    <View style={{ gap: SPACE.one }}>
      <DataTable
        label="Set-points in litres per second"
        columns={columns}
        rows={[
          ...wells.map(wellRow),
          totalRow('Produced', wells, 'producer', weeks.length),
          totalRow('Injected', wells, 'injector', weeks.length),
        ]}
      />
      <Words size="small" tone="quiet">
        {meanings.join(' · ')}
      </Words>
    </View>
  );
}

function wellRow(well: Well): Row {
  const first = well.weeklyM3PerS[0] ?? well.lastRateM3PerS;
  return {
    key: well.name,
    cells: [
      <WellName key="name" well={well} />,
      litresPerSecond(well.lastRateM3PerS),
      litresChange(first - well.lastRateM3PerS),
      ...well.weeklyM3PerS.map((rate, week) => (
        <SetPoint key={week} rateM3PerS={rate} state={well.weeklyState[week] ?? 'free'} />
      )),
    ],
  };
}

function WellName({ well }: { well: Well }) {
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.one }}>
      <WellMark kind={well.kind} isFixed={!well.control} />
      <View>
        <Words weight="medium">{well.name}</Words>
        <Words size="small" tone="quiet">
          {well.kind}
        </Words>
      </View>
    </View>
  );
}

function SetPoint({ rateM3PerS, state }: { rateM3PerS: number; state: State }) {
  return (
    <View>
      <Words tabular align="right" tone={state === 'outage' ? 'quiet' : 'ink'}>
        {litresPerSecond(rateM3PerS)}
      </Words>
      <Words size="small" tone="quiet" align="right" style={{ minHeight: 16 }}>
        {STATE_WORDS[state]}
      </Words>
    </View>
  );
}

function totalRow(name: string, wells: Well[], kind: Well['kind'], weeks: number): Row {
  const ofKind = wells.filter((well) => well.kind === kind);
  const last = ofKind.reduce((sum, well) => sum + well.lastRateM3PerS, 0);
  const totals = Array.from({ length: weeks }, (_, week) =>
    ofKind.reduce((sum, well) => sum + (well.weeklyM3PerS[week] ?? 0), 0),
  );
  return {
    key: name,
    isStrong: true,
    cells: [
      name,
      litresPerSecond(last),
      litresChange((totals[0] ?? last) - last),
      ...totals.map((total) => litresPerSecond(total)),
    ],
  };
}
