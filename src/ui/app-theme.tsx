import { type ReactNode } from 'react';
import { useColorScheme } from 'react-native';
import { PaperProvider } from 'react-native-paper';

import { PageStyle } from '../lib/platform/page-style';
import { Icon, isIconName } from './icon';
import { darkTheme, lightTheme } from './theme';

/** What the component library asks for by its own names. */
const ICONS: Record<string, string> = { 'menu-down': 'down', 'chevron-down': 'down', 'chevron-up': 'up' };

/** Light or dark as the system is. */
export function AppTheme({ children }: { children: ReactNode }) {
  const theme = useColorScheme() === 'dark' ? darkTheme : lightTheme;
  return (
    <PaperProvider theme={theme} settings={{ icon: PaperIcon }}>
      <PageStyle paper={theme.tokens.paper} focus={theme.tokens.primary} isDark={theme.dark} />
      {children}
    </PaperProvider>
  );
}

function PaperIcon({ name, color, size }: { name: unknown; color?: string; size: number }) {
  const own = typeof name === 'string' ? (ICONS[name] ?? name) : name;
  return isIconName(own) ? <Icon name={own} color={color} size={size} /> : null;
}
