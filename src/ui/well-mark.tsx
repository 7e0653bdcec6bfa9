import { View } from 'react-native';
import Svg, { Path, Rect } from 'react-native-svg';

import type { WellKind } from '../contract/enums';
import { useTokens } from './theme';

const NOTCHED_DISC = 'M11 2.290 A7 7 0 1 1 7 2.290 L7 7 L11 7 Z';
const RING_OPEN_BELOW = 'M11.400 15.570 A7 7 0 1 0 6.600 15.570';

/** A producer is a disc with a notch in its top, an injector a ring open at its bottom, a monitor a square. */
export function WellMark({
  kind,
  isFixed = false,
  size = 18,
}: {
  kind: WellKind;
  isFixed?: boolean;
  size?: number;
}) {
  const tokens = useTokens();
  const dash = isFixed ? '2.4 2.4' : undefined;
  return (
    <View aria-hidden style={{ width: size, height: size }}>
      <Svg width={size} height={size} viewBox="0 0 18 18" fill="none">
        {kind === 'producer' && (
          <Path
            d={NOTCHED_DISC}
            fill={isFixed ? 'none' : tokens.ember}
            stroke={tokens.ember}
            strokeWidth={1.5}
            strokeDasharray={dash}
          />
        )}
        {kind === 'injector' && (
          <Path d={RING_OPEN_BELOW} stroke={tokens.primary} strokeWidth={2.4} strokeDasharray={dash} />
        )}
        {kind === 'monitor' && (
          <Rect x={4} y={4} width={10} height={10} stroke={tokens.quiet} strokeWidth={1.5} />
        )}
      </Svg>
    </View>
  );
}
