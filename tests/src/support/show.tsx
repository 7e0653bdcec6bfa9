import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import { type ReactElement } from 'react';

import { makeQueryClient } from '../../../src/api/query-client';
import { SessionProvider } from '../../../src/session/session-provider';
import { AppTheme } from '../../../src/ui/app-theme';

/** A screen with everything around it that it has in the application. */
export function show(screen: ReactElement) {
  const client = makeQueryClient();
  client.setDefaultOptions({ queries: { ...client.getDefaultOptions().queries, retry: false } });
  return render(
    <QueryClientProvider client={client}>
      <AppTheme>
        <SessionProvider>{screen}</SessionProvider>
      </AppTheme>
    </QueryClientProvider>,
  );
}
