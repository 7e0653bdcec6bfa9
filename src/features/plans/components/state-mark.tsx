import { View } from 'react-native';

import { Icon, type IconName } from '../../../ui/icon';
import { useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

const SHAPES: Record<string, IconName> = {
  Computing: 'clock',
  Failed: 'alert',
  Cancelled: 'close',
  Withdrawn: 'minus',
  Returned: 'left',
  'In review': 'eye',
  Signed: 'check',
  Issued: 'right',
  Closed: 'stop',
};

/** A state as a word and a shape. */
export function StateMark({ state }: { state: string }) {
  const tokens = useTokens();
  const shape = SHAPES[state];
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: 4 }}>
      {shape && <Icon name={shape} size={16} color={state === 'Failed' ? tokens.danger : tokens.quiet} />}
      <Words
        size="small"
        weight="medium"
        tone={state === 'Failed' ? 'danger' : 'quiet'}
        style={{ lineHeight: 20 }}
      >
        {state}
      </Words>
    </View>
  );
}
