import { View } from 'react-native';

import type { FieldWeek } from '../../../contract/fields';
import { heat, inWords, multiple, percent } from '../../../lib/format';
import { PLAN_STATE_NAMES } from '../../../lib/words';
import { BigFigure } from '../../../ui/big-figure';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';

/** The two numbers of a field: how restless the ground is forecast to be, and how much of what was sold is met. */
export function Figures({ week }: { week: FieldWeek }) {
  const plan = week.field.newestPlan;
  if (!plan) {
    return (
      <Words size="lead" style={{ maxWidth: 640 }}>
        No plan has been computed yet. Once there is one, its forecast and its energy stand here.
      </Words>
    );
  }
  const name = `plan ${plan.number}, ${PLAN_STATE_NAMES[plan.state].toLowerCase()}`;
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: SPACE.three, rowGap: SPACE.two }}>
      <BigFigure
        quantity={multiple(plan.rateMultiple)}
        tone="plum"
        name="Earthquakes forecast"
        note={`against background (${name})`}
      />
      <BigFigure
        quantity={percent(plan.heatJ / plan.heatTargetJ)}
        tone="ember"
        name="Energy planned"
        note={`of the target: ${inWords(heat(plan.heatJ))} of ${inWords(heat(plan.heatTargetJ))}`}
      />
    </View>
  );
}
