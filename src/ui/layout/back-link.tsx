import { type Href } from 'expo-router';
import { type ReactNode } from 'react';

import { Icon } from '../icon';
import { PressLink } from '../press-link';
import { SPACE, useTokens } from '../theme';
import { Words } from '../words';

/** Up to where this page belongs. */
export function BackLink({ href, children }: { href: Href; children: ReactNode }) {
  const tokens = useTokens();
  return (
    <PressLink
      href={href}
      style={{
        flexDirection: 'row',
        alignItems: 'center',
        alignSelf: 'flex-start',
        paddingRight: SPACE.one,
        marginLeft: -6,
      }}
    >
      <Icon name="left" size={20} color={tokens.quiet} />
      <Words tone="quiet" weight="medium">
        {children}
      </Words>
    </PressLink>
  );
}
