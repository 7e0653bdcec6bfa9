import { View } from 'react-native';

import type { PlanDetail, PlanResult } from '../../../contract/plans';
import { ForecastChart } from '../../../ui/chart/forecast-chart';
import { Section } from '../../../ui/layout/section';
import { SPACE } from '../../../ui/theme';
import { chanceSentence } from '../sentences';
import { Certainty } from './certainty';
import { Comparison } from './comparison';
import { EnergyChart } from './energy-chart';
import { Headline } from './headline';
import { PressureChart } from './pressure-chart';
import { RatesTable } from './rates-table';
import { WhatBinds } from './what-binds';
import { ZonesTable } from './zones-table';

interface PlanViewProps {
  detail: PlanDetail;
  result: PlanResult;
}

/** A computed plan from the answer down to what it rests on. */
export function PlanView({ detail, result }: PlanViewProps) {
  const { timeZone, pastWeeks } = detail;
  const shared = { result, timeZone };
  return (
    <View style={{ gap: SPACE.four }}>
      <Headline result={result} />
      <Section
        title="Set-points"
        intro="l/s for each week. Decision support only: Stillfield moves no valve; the permit, local codes and licensed judgement decide."
      >
        <RatesTable {...shared} />
      </Section>
      <Section title="Forecast" intro={chanceSentence(result)}>
        <ForecastChart pastWeeks={pastWeeks} result={result} timeZone={timeZone} />
      </Section>
      <Section title="Energy against target">
        <EnergyChart {...shared} />
      </Section>
      <Section title="Compared with the simple ways">
        <Comparison result={result} />
      </Section>
      <Section title="What binds" intro="What one unit of give in a limit would be worth, dearest first.">
        <WhatBinds binding={result.binding} />
      </Section>
      <Section title="Bottom-hole pressure">
        <PressureChart {...shared} />
      </Section>
      {(result.weeks[0]?.zones.length ?? 0) > 0 && (
        <Section title="Zones" intro="Expected earthquakes and rate against background, zone by zone.">
          <ZonesTable {...shared} />
        </Section>
      )}
      <Section title="How good, how sure">
        <Certainty result={result} />
      </Section>
    </View>
  );
}
