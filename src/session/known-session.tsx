import type { ReactNode } from 'react';

import { Failed, Loading } from '../ui/layout/states';
import { useSession } from './session-provider';

/**
 * Shows the pages once it is known who is there. Above the router's first page, not inside it: a layout that holds
 * back its pages after the router has begun loses the rest of the address.
 */
export function KnownSession({ children }: { children: ReactNode }) {
  const { state } = useSession();
  if (state.kind === 'unknown') return <Loading what="Stillfield" />;
  if (state.kind === 'unreachable')
    return <Failed what="Stillfield" error={state.error} retry={state.retry} />;
  return children;
}
