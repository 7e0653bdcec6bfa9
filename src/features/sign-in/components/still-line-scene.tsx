import { View } from 'react-native';
import Svg, { G, Line, Path } from 'react-native-svg';

import { Logo, STILL_LINE } from '../../../ui/logo';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

/** What this is for, in one line and one picture. */
export function StillLineScene({ isWide }: { isWide: boolean }) {
  if (!isWide) {
    return (
      <View style={{ paddingHorizontal: SPACE.two, paddingTop: SPACE.four, gap: SPACE.two }}>
        <Logo />
        <Purpose isWide={false} />
      </View>
    );
  }
  return <WideScene />;
}

function WideScene() {
  const tokens = useTokens();
  const stroke = { stroke: tokens.primary, strokeWidth: 0.5 };
  return (
    <View
      style={{
        flex: 1.2,
        justifyContent: 'center',
        borderRightWidth: 1,
        borderRightColor: tokens.hairline,
        gap: SPACE.four,
      }}
    >
      <View style={{ paddingHorizontal: SPACE.six }}>
        <Logo large />
      </View>
      <View aria-hidden style={{ width: '100%', aspectRatio: 3.2 }}>
        <Svg width="100%" height="100%" viewBox="0 0 96 30" fill="none">
          <Line x1={0} x2={12} y1={16} y2={16} {...stroke} />
          <G transform="translate(10, 0)">
            <Path d={STILL_LINE} {...stroke} strokeLinejoin="round" />
          </G>
          <Line x1={71} x2={96} y1={16} y2={16} {...stroke} />
        </Svg>
      </View>
      <View style={{ paddingHorizontal: SPACE.six }}>
        <Purpose isWide />
      </View>
    </View>
  );
}

function Purpose({ isWide }: { isWide: boolean }) {
  return (
    <Words size={isWide ? 'head' : 'lead'} tone={isWide ? 'ink' : 'quiet'} style={{ maxWidth: 560 }}>
      The heat that was sold, from wells within their limits, over ground that stays still.
    </Words>
  );
}
