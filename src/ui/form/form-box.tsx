import { type ReactNode } from 'react';
import { View, type ViewStyle } from 'react-native';

/** What belongs to one form. */
export function FormBox({ children, style }: { children: ReactNode; style?: ViewStyle }) {
  return <View style={style}>{children}</View>;
}
