import { type ReactNode } from 'react';
import { View, type ViewStyle } from 'react-native';

/** A form that the browser knows as one, so that password managers find it. Its fields submit by themselves. */
export function FormBox({ children, style }: { children: ReactNode; style?: ViewStyle }) {
  return (
    <form onSubmit={(event) => event.preventDefault()} noValidate style={{ display: 'contents' }}>
      <View style={style}>{children}</View>
    </form>
  );
}
