import { useState } from 'react';
import { Pressable } from 'react-native';

import { CORNER, SPACE, TOUCH_TARGET, useTokens } from '../theme';
import { Words } from '../words';

/** The first thing a keyboard reaches; out of sight until it does. */
export function SkipLink({ onPress }: { onPress: () => void }) {
  const tokens = useTokens();
  const [isFocused, setIsFocused] = useState(false);
  return (
    <Pressable
      role="link"
      onPress={onPress}
      onFocus={() => setIsFocused(true)}
      onBlur={() => setIsFocused(false)}
      style={{
        position: 'absolute',
        zIndex: 10,
        top: SPACE.one,
        left: isFocused ? SPACE.one : -9999,
        minHeight: TOUCH_TARGET,
        justifyContent: 'center',
        paddingHorizontal: SPACE.two,
        borderRadius: CORNER,
        backgroundColor: tokens.primary,
      }}
    >
      <Words tone="onPrimary" weight="medium">
        Skip to the content
      </Words>
    </Pressable>
  );
}
