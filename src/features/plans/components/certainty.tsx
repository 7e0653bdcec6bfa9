import { View } from 'react-native';

import type { PlanResult } from '../../../contract/plans';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { checkSentence, gapSentence, MODEL_CAUTION } from '../sentences';

/** The certificate, the check that shares nothing with it, and what neither can know. */
export function Certainty({ result }: { result: PlanResult }) {
  return (
    <View style={{ gap: SPACE.one, maxWidth: 760 }}>
      <Words size="lead">{gapSentence(result)}</Words>
      <Words>{checkSentence(result)}</Words>
      <Words tone="quiet">{MODEL_CAUTION}</Words>
    </View>
  );
}
