import { Link, type Href } from 'expo-router';
import { useState, type ReactNode } from 'react';
import { Pressable, StyleSheet, type StyleProp, type ViewStyle } from 'react-native';

import { CORNER, TOUCH_TARGET, useTokens } from './theme';

interface PressLinkProps {
  href: Href;
  children: ReactNode;
  label?: string;
  /** The place that is on the screen now. */
  current?: boolean;
  style?: StyleProp<ViewStyle>;
}

/** A real link, with an address that can be opened in a new tab, as large as what it holds. */
export function PressLink({ href, children, label, current = false, style }: PressLinkProps) {
  const tokens = useTokens();
  const [isHovered, setIsHovered] = useState(false);
  return (
    <Link href={href} asChild>
      <Pressable
        aria-label={label}
        aria-current={current ? 'page' : undefined}
        onHoverIn={() => setIsHovered(true)}
        onHoverOut={() => setIsHovered(false)}
        // The link hands its style on as one object; a list would not survive that.
        style={StyleSheet.flatten([
          { minHeight: TOUCH_TARGET, borderRadius: CORNER },
          (current || isHovered) && { backgroundColor: tokens.wash },
          style,
        ])}
      >
        {children}
      </Pressable>
    </Link>
  );
}
