import { View } from 'react-native';

import { useTokens } from './theme';

const HEIGHT = 8;

/** The one of the component library does not tell a screen reader on the web how far it is. */
export function ProgressBar({ percentDone }: { percentDone: number }) {
  const tokens = useTokens();
  return (
    <View
      role="progressbar"
      aria-label="Progress of the plan"
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percentDone}
      style={{
        height: HEIGHT,
        borderRadius: HEIGHT / 2,
        backgroundColor: tokens.hairline,
        overflow: 'hidden',
      }}
    >
      <View
        style={[
          {
            height: HEIGHT,
            width: `${percentDone}%`,
            borderRadius: HEIGHT / 2,
            backgroundColor: tokens.primary,
          },
          { transitionProperty: 'width', transitionDuration: '200ms' } as object,
        ]}
      />
    </View>
  );
}
