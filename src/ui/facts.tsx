import { View } from 'react-native';

import { SPACE, useTokens } from './theme';
import { Words } from './words';

/** Names and what they are, one a line. */
export function Facts({ facts }: { facts: { name: string; value: string }[] }) {
  const tokens = useTokens();
  return (
    <View role="list" style={{ maxWidth: 720 }}>
      {facts.map(({ name, value }, index) => (
        <View
          key={name}
          role="listitem"
          style={{
            flexDirection: 'row',
            flexWrap: 'wrap',
            columnGap: SPACE.two,
            paddingVertical: SPACE.one,
            borderTopWidth: index === 0 ? 0 : 1,
            borderTopColor: tokens.hairline,
          }}
        >
          <Words tone="quiet" style={{ flexBasis: 168, flexShrink: 0 }}>
            {name}
          </Words>
          <Words
            tabular
            style={{ flexGrow: 1, flexShrink: 1, flexBasis: 160, overflowWrap: 'anywhere' } as object}
          >
            {value}
          </Words>
        </View>
      ))}
    </View>
  );
}
