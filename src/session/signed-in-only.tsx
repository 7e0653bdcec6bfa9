import { Redirect, usePathname, useGlobalSearchParams } from 'expo-router';
import { type ReactNode } from 'react';

import { Failed, Loading } from '../ui/layout/states';
import { useSession } from './session-provider';

/** Sends everybody else to sign in, and remembers where they wanted to go. The server decides what they get. */
export function SignedInOnly({ children }: { children: ReactNode }) {
  const { state } = useSession();
  const from = useHere();
  if (state.kind === 'unknown') return <Loading what="your fields" />;
  if (state.kind === 'unreachable') {
    return <Failed what="Stillfield" error={state.error} retry={state.retry} />;
  }
  if (state.kind === 'signedOut') {
    return <Redirect href={from === '/' ? '/sign-in' : { pathname: '/sign-in', params: { from } }} />;
  }
  return children;
}

/** The address on the screen with what follows the question mark. */
function useHere(): string {
  const pathname = usePathname();
  const params = useGlobalSearchParams();
  const inPath = pathname.split('/');
  const rest = Object.entries(params).flatMap(([name, value]) =>
    typeof value !== 'string' || inPath.includes(value) ? [] : [`${name}=${encodeURIComponent(value)}`],
  );
  return rest.length > 0 ? `${pathname}?${rest.join('&')}` : pathname;
}
