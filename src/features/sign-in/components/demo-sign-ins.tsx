import { Pressable, View } from 'react-native';

import { ROLE_NAMES } from '../../../lib/words';
import { Icon } from '../../../ui/icon';
import { SPACE, TOUCH_TARGET, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { useDemoSignIns } from '../queries';

interface DemoSignInsProps {
  onChoose: (credentials: { email: string; password: string }) => void;
  isBusy: boolean;
}

/** One tap into the demonstration; not there where there is none. */
export function DemoSignIns({ onChoose, isBusy }: DemoSignInsProps) {
  const tokens = useTokens();
  const { data: signIns = [] } = useDemoSignIns();
  if (signIns.length === 0) return null;
  return (
    <View role="region" aria-label="Demo sign-ins" style={{ marginTop: SPACE.two }}>
      <Words size="small" tone="quiet" style={{ paddingBottom: SPACE.one }}>
        This is a demonstration with invented people. Sign in as one of them:
      </Words>
      {signIns.map(({ name, email, password, role }) => (
        <Pressable
          key={email}
          role="button"
          disabled={isBusy}
          aria-label={`Sign in as ${name}, ${ROLE_NAMES[role].toLowerCase()}`}
          onPress={() => onChoose({ email, password })}
          style={{
            minHeight: TOUCH_TARGET + SPACE.one,
            flexDirection: 'row',
            alignItems: 'center',
            gap: SPACE.small,
            borderTopWidth: 1,
            borderTopColor: tokens.hairline,
          }}
        >
          <Icon name="person" color={tokens.primary} />
          <View style={{ flexGrow: 1, flexShrink: 1 }}>
            <Words weight="medium">{ROLE_NAMES[role]}</Words>
            <Words size="small" tone="quiet">
              {name}
            </Words>
          </View>
          <Icon name="right" size={20} color={tokens.quiet} />
        </Pressable>
      ))}
    </View>
  );
}
