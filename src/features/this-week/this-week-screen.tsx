import { useRouter } from 'expo-router';
import { View } from 'react-native';

import { usePlan } from '../../api/plans';
import type { FieldWeek } from '../../contract/fields';
import { weekdayName } from '../../lib/format';
import { useWidth } from '../../lib/use-width';
import { Button } from '../../ui/button';
import { ForecastChart } from '../../ui/chart/forecast-chart';
import { Screen } from '../../ui/layout/screen';
import { Section } from '../../ui/layout/section';
import { Failed, Loading } from '../../ui/layout/states';
import { SPACE } from '../../ui/theme';
import { Words } from '../../ui/words';
import { Ages } from './components/ages';
import { Figures } from './components/figures';
import { LoopSteps } from './components/loop-steps';
import { NextThing } from './components/next-thing';
import { useFieldWeek } from './queries';

export function ThisWeekScreen({ fieldId }: { fieldId: string }) {
  const { data: week, error, refetch } = useFieldWeek(fieldId);
  const router = useRouter();
  if (!week) {
    return (
      <Screen title="This week">
        {error ? (
          <Failed what="This week" error={error} retry={() => void refetch()} />
        ) : (
          <Loading what="this week" />
        )}
      </Screen>
    );
  }
  const { field, can, runningJobId } = week;
  return (
    <Screen
      title="This week"
      of={field.name}
      intro={`Week of ${weekdayName(field.weekStartsAt, field.timeZone)} · ${field.place}`}
      action={
        can.buildPlan && runningJobId === null ? (
          <Button
            kind="main"
            icon="plus"
            onPress={() => router.push({ pathname: '/fields/[fieldId]/plans/new', params: { fieldId } })}
          >
            Build the plan
          </Button>
        ) : undefined
      }
    >
      <Week week={week} />
    </Screen>
  );
}

function Week({ week }: { week: FieldWeek }) {
  const { hasTwoPanes } = useWidth();
  const { field } = week;
  const { data: detail } = usePlan(field.id, field.newestPlan?.id ?? null);
  return (
    <>
      <NextThing week={week} />
      <View
        style={{ flexDirection: hasTwoPanes ? 'row' : 'column', gap: hasTwoPanes ? SPACE.six : SPACE.four }}
      >
        <View style={{ flex: hasTwoPanes ? 1 : undefined, minWidth: 0, gap: SPACE.three }}>
          <Figures week={week} />
          <ForecastChart
            pastWeeks={week.pastWeeks}
            result={detail?.result ?? null}
            timeZone={field.timeZone}
            height={hasTwoPanes ? 300 : 240}
          />
          <Section title="Since last week">
            <Words size="lead" style={{ maxWidth: 720 }}>
              {week.change}
            </Words>
            <Ages week={week} />
          </Section>
        </View>
        <View style={{ width: hasTwoPanes ? 336 : '100%' }}>
          <Section title="The weekly loop">
            <LoopSteps steps={week.steps} roles={field.roles} />
          </Section>
        </View>
      </View>
    </>
  );
}
