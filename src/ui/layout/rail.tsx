import { View } from 'react-native';

import { useMe } from '../../session/session-provider';
import { listed } from '../../lib/format';
import { ROLE_NAMES } from '../../lib/words';
import { Icon } from '../icon';
import { Logo } from '../logo';
import { PressLink } from '../press-link';
import { SPACE, useTokens } from '../theme';
import { Words } from '../words';
import { type Destination } from './destinations';
import { FieldSwitcher } from './field-switcher';

export const RAIL_WIDTH = 232;

/** The way around on a wide screen. */
export function Rail({ destinations, fieldId }: { destinations: Destination[]; fieldId: string | null }) {
  const tokens = useTokens();
  const me = useMe();
  const roles = me?.memberships.find((membership) => membership.fieldId === fieldId)?.roles ?? [];
  return (
    <View
      role="banner"
      style={{
        width: RAIL_WIDTH,
        position: 'sticky' as 'relative',
        top: 0,
        height: '100vh' as '100%',
        paddingHorizontal: SPACE.two,
        paddingTop: SPACE.four,
        paddingBottom: SPACE.three,
        gap: SPACE.three,
      }}
    >
      <View style={{ paddingHorizontal: SPACE.one }}>
        <Logo />
      </View>
      {fieldId && <FieldSwitcher fieldId={fieldId} />}
      <View role="navigation" aria-label="Main" style={{ gap: SPACE.half }}>
        {destinations.map(({ name, icon, href, isCurrent }) => (
          <PressLink
            key={name}
            href={href}
            current={isCurrent}
            style={{
              flexDirection: 'row',
              alignItems: 'center',
              gap: SPACE.small,
              paddingHorizontal: SPACE.small,
            }}
          >
            <Icon name={icon} color={isCurrent ? tokens.primary : tokens.quiet} />
            <Words weight={isCurrent ? 'bold' : 'medium'} tone={isCurrent ? 'primary' : 'ink'}>
              {name}
            </Words>
          </PressLink>
        ))}
      </View>
      {me && (
        <View style={{ marginTop: 'auto', paddingHorizontal: SPACE.small }}>
          <Words weight="medium">{me.name}</Words>
          <Words size="small" tone="quiet">
            {roles.length > 0 ? listed(roles.map((role) => ROLE_NAMES[role])) : me.email}
          </Words>
        </View>
      )}
    </View>
  );
}
