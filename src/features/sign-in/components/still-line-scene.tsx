import { View } from 'react-native';
import Svg, { Path } from 'react-native-svg';

import { Logo, STILL_LINE } from '../../../ui/logo';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

/** What this is for, in one line and one picture. */
export function StillLineScene({ isWide }: { isWide: boolean }) {
  const tokens = useTokens();
  return (
    <View
      style={{
        flex: isWide ? 1 : undefined,
        justifyContent: 'center',
        gap: isWide ? SPACE.four : SPACE.two,
        padding: isWide ? SPACE.six : SPACE.two,
        paddingTop: isWide ? SPACE.six : SPACE.four,
        borderRightWidth: isWide ? 1 : 0,
        borderRightColor: tokens.hairline,
      }}
    >
      {!isWide && <Logo />}
      {isWide && (
        <View aria-hidden style={{ width: '100%', maxWidth: 620, aspectRatio: 2 }}>
          <Svg width="100%" height="100%" viewBox="0 0 64 32" fill="none">
            <Path d={STILL_LINE} stroke={tokens.primary} strokeWidth={0.7} strokeLinecap="round" />
          </Svg>
        </View>
      )}
      <Words size={isWide ? 'head' : 'lead'} tone={isWide ? 'ink' : 'quiet'} style={{ maxWidth: 560 }}>
        The heat that was sold, from wells within their limits, over ground that stays still.
      </Words>
    </View>
  );
}
