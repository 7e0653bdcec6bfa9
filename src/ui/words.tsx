import { type ReactNode } from 'react';
import { Text, type Role, type StyleProp, type TextStyle } from 'react-native';

import { FONT } from './fonts';
import { useTokens, type Tokens } from './theme';

/** 12/14/16/20/28/44, and nothing between; 44 for at most two figures on a screen. */
const SIZES = {
  small: { fontSize: 12, lineHeight: 16 },
  body: { fontSize: 14, lineHeight: 20 },
  lead: { fontSize: 16, lineHeight: 24 },
  title: { fontSize: 20, lineHeight: 28 },
  head: { fontSize: 28, lineHeight: 36 },
  figure: { fontSize: 44, lineHeight: 52 },
} as const;

export type Size = keyof typeof SIZES;
export type Tone = Extract<
  keyof Tokens,
  'ink' | 'quiet' | 'primary' | 'onPrimary' | 'ember' | 'plum' | 'danger'
>;

export interface WordsProps {
  children: ReactNode;
  size?: Size;
  tone?: Tone;
  weight?: keyof typeof FONT;
  /** Figures of one width, for columns of numbers. */
  tabular?: boolean;
  /** Makes it a heading of this level. */
  level?: 1 | 2 | 3;
  align?: 'left' | 'center' | 'right';
  lines?: number;
  role?: Role;
  live?: 'polite' | 'assertive';
  id?: string;
  style?: StyleProp<TextStyle>;
}

/** All text of the application. */
export function Words(props: WordsProps) {
  const { children, size = 'body', tone = 'ink', weight = 'regular', level, align, tabular, style } = props;
  const tokens = useTokens();
  const heading = level === undefined ? {} : { role: 'heading' as const, 'aria-level': level };
  return (
    <Text
      id={props.id}
      role={props.role}
      aria-live={props.live}
      {...heading}
      numberOfLines={props.lines}
      style={[
        SIZES[size],
        { color: tokens[tone], fontFamily: FONT[weight], textAlign: align },
        tabular && { fontVariant: ['tabular-nums'] },
        style,
      ]}
    >
      {children}
    </Text>
  );
}
