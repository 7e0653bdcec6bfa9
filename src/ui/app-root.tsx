import { QueryClientProvider } from '@tanstack/react-query';
import { useFonts } from 'expo-font';
import { StatusBar } from 'expo-status-bar';
import { useState, type ReactNode } from 'react';

import { makeQueryClient } from '../api/query-client';
import { quietLibraries } from '../lib/platform/quiet-libraries';
import { KnownSession } from '../session/known-session';
import { SessionProvider } from '../session/session-provider';
import { AppTheme } from './app-theme';
import { FONT_FILES } from './fonts';

quietLibraries();

/** Everything that is there once: theme, fonts, what the server said, who is signed in. */
export function AppRoot({ children }: { children: ReactNode }) {
  const [client] = useState(makeQueryClient);
  const [areFontsLoaded, fontError] = useFonts(FONT_FILES);
  return (
    <QueryClientProvider client={client}>
      <AppTheme>
        <StatusBar style="auto" />
        <SessionProvider>
          {areFontsLoaded || fontError ? <KnownSession>{children}</KnownSession> : null}
        </SessionProvider>
      </AppTheme>
    </QueryClientProvider>
  );
}
