import { View } from 'react-native';

import type { PlanResult } from '../../../contract/plans';
import { heat, inWords, multiple, percent } from '../../../lib/format';
import { BigFigure } from '../../../ui/big-figure';
import { Icon } from '../../../ui/icon';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { headline, heatTargetJ, SHADOW_SENTENCE } from '../sentences';

/** The answer. */
export function Headline({ result }: { result: PlanResult }) {
  const tokens = useTokens();
  const { planWeeks, stressShadow } = result;
  const targetJ = heatTargetJ(result);
  return (
    <View style={{ gap: SPACE.three }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: SPACE.three, rowGap: SPACE.two }}>
        <BigFigure
          quantity={multiple(planWeeks.rateMultiple)}
          tone="plum"
          name="Earthquakes forecast"
          note="against background, in the plan’s weeks"
        />
        <BigFigure
          quantity={percent(planWeeks.heatJ / targetJ)}
          tone="ember"
          name="Energy planned"
          note={`of the target: ${inWords(heat(planWeeks.heatJ))} of ${inWords(heat(targetJ))}`}
        />
      </View>
      <Words size="title" style={{ maxWidth: 760 }}>
        {headline(result)}
      </Words>
      {stressShadow && (
        <View role="note" style={{ flexDirection: 'row', gap: SPACE.one, maxWidth: 760 }}>
          <Icon name="alert" size={20} color={tokens.ember} />
          <Words style={{ flexShrink: 1 }}>{SHADOW_SENTENCE}</Words>
        </View>
      )}
    </View>
  );
}
