import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';

import type { Me } from '../../../contract/people';
import { listed } from '../../../lib/format';
import { ROLE_NAMES } from '../../../lib/words';
import { useSession } from '../../../session/session-provider';
import { Button } from '../../../ui/button';
import { Icon } from '../../../ui/icon';
import { Section } from '../../../ui/layout/section';
import { PressLink } from '../../../ui/press-link';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

/** Who is signed in, what they are in which field, and the way out. */
export function Account({ me }: { me: Me }) {
  const { signOut } = useSession();
  const leaving = useMutation({ mutationFn: signOut });
  const tokens = useTokens();
  return (
    <Section title="You">
      <View>
        <Words size="lead" weight="medium">
          {me.name}
        </Words>
        <Words tone="quiet">{me.email}</Words>
      </View>
      <View role="list">
        {me.memberships.map(({ fieldId, fieldName, roles }) => (
          <View key={fieldId} role="listitem" style={{ borderTopWidth: 1, borderTopColor: tokens.hairline }}>
            <PressLink
              href={{ pathname: '/fields/[fieldId]', params: { fieldId } }}
              style={{
                flexDirection: 'row',
                alignItems: 'center',
                paddingVertical: SPACE.one,
                gap: SPACE.one,
              }}
            >
              <View style={{ flexGrow: 1, flexShrink: 1 }}>
                <Words weight="medium">{fieldName}</Words>
                <Words size="small" tone="quiet">
                  {listed(roles.map((role) => ROLE_NAMES[role]))}
                </Words>
              </View>
              <Icon name="right" size={20} color={tokens.quiet} />
            </PressLink>
          </View>
        ))}
      </View>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.one }}>
        <Button icon="signOut" onPress={() => leaving.mutate()} busy={leaving.isPending}>
          Sign out
        </Button>
      </View>
      {leaving.error && (
        <Words tone="danger" role="alert">
          {leaving.error.message}
        </Words>
      )}
    </Section>
  );
}
