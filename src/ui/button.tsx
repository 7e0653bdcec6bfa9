import { type ReactNode } from 'react';
import { Button as PaperButton } from 'react-native-paper';

import { type IconName } from './icon';
import { CORNER, TOUCH_TARGET, useTokens } from './theme';

interface ButtonProps {
  children: ReactNode;
  onPress: () => void;
  kind?: 'main' | 'plain' | 'quiet' | 'danger';
  icon?: IconName;
  busy?: boolean;
  disabled?: boolean;
  label?: string;
}

const MODES = { main: 'contained', plain: 'outlined', quiet: 'text', danger: 'contained' } as const;

/** A verb to press, never smaller than a thumb. */
export function Button(props: ButtonProps) {
  const { children, onPress, kind = 'plain', icon, busy = false, disabled = false, label } = props;
  const tokens = useTokens();
  const isDanger = kind === 'danger';
  return (
    <PaperButton
      mode={MODES[kind]}
      onPress={onPress}
      icon={icon}
      loading={busy}
      disabled={disabled || busy}
      accessibilityLabel={label}
      buttonColor={isDanger ? tokens.danger : undefined}
      textColor={isDanger ? tokens.onDanger : undefined}
      uppercase={false}
      style={{ borderRadius: CORNER, minWidth: TOUCH_TARGET }}
      contentStyle={{ minHeight: TOUCH_TARGET }}
      labelStyle={{ fontSize: 14, lineHeight: 20 }}
    >
      {children}
    </PaperButton>
  );
}
