import { usePathname } from 'expo-router';
import { useRef, type ReactNode } from 'react';
import { View } from 'react-native';

import { useWidth } from '../../lib/use-width';
import { useMe } from '../../session/session-provider';
import { Icon } from '../icon';
import { LogoMark } from '../logo';
import { PressLink } from '../press-link';
import { SPACE, useTokens } from '../theme';
import { Words } from '../words';
import { BottomBar } from './bottom-bar';
import { destinationsOf, OUTSIDE_FIELDS } from './destinations';
import { Rail } from './rail';
import { MAIN_ID, SkipLink } from './skip-link';

/** What stays while pages change: a rail on a wide screen; a head and a bar on a phone. */
export function Shell({ fieldId, children }: { fieldId: string | null; children: ReactNode }) {
  const { hasRail } = useWidth();
  const pathname = usePathname();
  const tokens = useTokens();
  const main = useRef<View>(null);
  const destinations = fieldId ? destinationsOf(fieldId, pathname) : OUTSIDE_FIELDS;
  return (
    <View style={{ flexGrow: 1, flexDirection: hasRail ? 'row' : 'column' }}>
      <SkipLink onPress={() => main.current?.focus()} />
      {hasRail ? (
        <View style={{ borderRightWidth: 1, borderRightColor: tokens.hairline }}>
          <Rail destinations={destinations} fieldId={fieldId} />
        </View>
      ) : (
        <PhoneHead fieldId={fieldId} />
      )}
      <View
        ref={main}
        role="main"
        id={MAIN_ID}
        tabIndex={-1}
        style={{
          flexGrow: 1,
          flexShrink: 1,
          flexBasis: hasRail ? 0 : 'auto',
          minWidth: 0,
          alignItems: 'center',
        }}
      >
        {children}
      </View>
      {!hasRail && fieldId !== null && <BottomBar destinations={destinations} />}
    </View>
  );
}

function PhoneHead({ fieldId }: { fieldId: string | null }) {
  const tokens = useTokens();
  const memberships = useMe()?.memberships ?? [];
  const name = memberships.find((membership) => membership.fieldId === fieldId)?.fieldName;
  return (
    <View
      role="banner"
      style={{
        flexDirection: 'row',
        alignItems: 'center',
        justifyContent: 'space-between',
        paddingHorizontal: SPACE.two,
        minHeight: 56,
        borderBottomWidth: 1,
        borderBottomColor: tokens.hairline,
      }}
    >
      <LogoMark height={22} />
      {name && (
        <PressLink
          href="/fields"
          label={`Field: ${name}. Switch`}
          style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.half, paddingLeft: SPACE.one }}
        >
          <Words weight="medium">{name}</Words>
          <Icon name="down" size={20} color={tokens.quiet} />
        </PressLink>
      )}
    </View>
  );
}
