import { Redirect } from 'expo-router';
import { useState, type ReactNode } from 'react';

import { currentAddress } from '../lib/platform/current-address';
import { Failed, Loading } from '../ui/layout/states';
import { useSession } from './session-provider';

/** Sends everybody else to sign in, and remembers where they wanted to go. The server decides what they get. */
export function SignedInOnly({ children }: { children: ReactNode }) {
  const { state } = useSession();
  if (state.kind === 'unknown') return <Loading what="your fields" />;
  if (state.kind === 'unreachable') {
    return <Failed what="Stillfield" error={state.error} retry={state.retry} />;
  }
  return state.kind === 'signedOut' ? <ToSignIn /> : children;
}

function ToSignIn() {
  // Read once: on the way the address becomes that of the sign-in page.
  const [from] = useState(currentAddress);
  return <Redirect href={from === '/' ? '/sign-in' : { pathname: '/sign-in', params: { from } }} />;
}
