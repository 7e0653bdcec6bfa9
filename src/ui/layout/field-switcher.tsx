import { useState } from 'react';
import { Pressable, View } from 'react-native';

import { useMe } from '../../session/session-provider';
import { Icon } from '../icon';
import { PressLink } from '../press-link';
import { CORNER, SPACE, TOUCH_TARGET, useTokens } from '../theme';
import { Words } from '../words';

/** Which field this is, and the way to another. */
export function FieldSwitcher({ fieldId }: { fieldId: string }) {
  const tokens = useTokens();
  const [isOpen, setIsOpen] = useState(false);
  const memberships = useMe()?.memberships ?? [];
  const current = memberships.find((membership) => membership.fieldId === fieldId);
  const others = memberships.filter((membership) => membership.fieldId !== fieldId);
  return (
    <View style={{ gap: SPACE.half }}>
      <Pressable
        role="button"
        aria-expanded={isOpen}
        aria-label={`Field: ${current?.fieldName ?? 'unknown'}. Switch`}
        onPress={() => setIsOpen(!isOpen)}
        style={{
          minHeight: TOUCH_TARGET,
          flexDirection: 'row',
          alignItems: 'center',
          justifyContent: 'space-between',
          paddingHorizontal: SPACE.small,
          borderRadius: CORNER,
          borderWidth: 1,
          borderColor: tokens.outline,
        }}
      >
        <Words weight="medium" lines={1}>
          {current?.fieldName ?? 'Fields'}
        </Words>
        <Icon name={isOpen ? 'up' : 'down'} size={20} color={tokens.quiet} />
      </Pressable>
      {isOpen && (
        <View>
          {others.map((other) => (
            <SwitchRow
              key={other.fieldId}
              name={other.fieldName}
              href={{ pathname: '/fields/[fieldId]', params: { fieldId: other.fieldId } }}
            />
          ))}
          <SwitchRow name="All fields" href="/fields" />
        </View>
      )}
    </View>
  );
}

function SwitchRow({ name, href }: { name: string; href: React.ComponentProps<typeof PressLink>['href'] }) {
  return (
    <PressLink href={href} style={{ justifyContent: 'center', paddingHorizontal: SPACE.small }}>
      <Words>{name}</Words>
    </PressLink>
  );
}
