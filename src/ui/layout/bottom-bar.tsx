import { View } from 'react-native';

import { Icon } from '../icon';
import { PressLink } from '../press-link';
import { SPACE, useTokens } from '../theme';
import { Words } from '../words';
import { type Destination } from './destinations';

/** The way around on a phone. */
export function BottomBar({ destinations }: { destinations: Destination[] }) {
  const tokens = useTokens();
  return (
    <View
      role="navigation"
      aria-label="Main"
      style={{
        position: 'sticky' as 'relative',
        bottom: 0,
        zIndex: 3,
        flexDirection: 'row',
        minHeight: 64,
        paddingHorizontal: SPACE.one,
        paddingVertical: SPACE.half,
        backgroundColor: tokens.paper,
        borderTopWidth: 1,
        borderTopColor: tokens.hairline,
      }}
    >
      {destinations.map(({ name, icon, href, isCurrent }) => (
        <PressLink
          key={name}
          href={href}
          current={isCurrent}
          style={{
            flex: 1,
            alignItems: 'center',
            justifyContent: 'center',
            backgroundColor: 'transparent',
            gap: 2,
          }}
        >
          <View
            style={{
              paddingHorizontal: SPACE.two,
              paddingVertical: 2,
              borderRadius: 16,
              backgroundColor: isCurrent ? tokens.wash : 'transparent',
            }}
          >
            <Icon name={icon} color={isCurrent ? tokens.primary : tokens.quiet} />
          </View>
          <Words size="small" weight={isCurrent ? 'bold' : 'medium'} tone={isCurrent ? 'primary' : 'quiet'}>
            {name}
          </Words>
        </PressLink>
      ))}
    </View>
  );
}
