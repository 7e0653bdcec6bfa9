import { useState } from 'react';
import { Text } from 'react-native';

import { FONT } from '../fonts';
import { CORNER, SPACE, TOUCH_TARGET, useTokens } from '../theme';

export const MAIN_ID = 'main';

/** The first thing a keyboard reaches; out of sight until it does. */
export function SkipLink({ onPress }: { onPress: () => void }) {
  const tokens = useTokens();
  const [isFocused, setIsFocused] = useState(false);
  // A true link on the web, so that browsers and readers know it for what it is.
  const webOnly = {
    href: `#${MAIN_ID}`,
    onFocus: () => setIsFocused(true),
    onBlur: () => setIsFocused(false),
  };
  return (
    <Text
      {...(webOnly as object)}
      onPress={(event) => {
        event.preventDefault();
        onPress();
      }}
      style={{
        position: 'absolute',
        zIndex: 10,
        top: SPACE.one,
        left: isFocused ? SPACE.one : -9999,
        lineHeight: TOUCH_TARGET,
        paddingHorizontal: SPACE.two,
        borderRadius: CORNER,
        backgroundColor: tokens.primary,
        color: tokens.onPrimary,
        fontFamily: FONT.medium,
        fontSize: 14,
      }}
    >
      Skip to the content
    </Text>
  );
}
