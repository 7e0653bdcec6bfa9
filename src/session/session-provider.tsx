import { useQuery, useQueryClient } from '@tanstack/react-query';
import { createContext, useContext, useMemo, type ReactNode } from 'react';

import { ApiError, callEndpoint, closeSession, openSession } from '../api/client';
import { keys } from '../api/keys';
import { getMe, type Me } from '../contract/people';

export type SessionState =
  | { kind: 'unknown' }
  | { kind: 'unreachable'; error: Error; retry: () => void }
  | { kind: 'signedOut' }
  | { kind: 'signedIn'; me: Me };

interface Session {
  state: SessionState;
  signIn(credentials: { email: string; password: string }): Promise<void>;
  signOut(): Promise<void>;
}

const SessionContext = createContext<Session | null>(null);

/** Who is signed in, as the server sees it: the session itself is in a cookie out of reach of scripts. */
export function SessionProvider({ children }: { children: ReactNode }) {
  const client = useQueryClient();
  const { data, error, refetch } = useQuery({ queryKey: keys.me, queryFn: readMe, staleTime: 300_000 });
  const session = useMemo<Session>(
    () => ({
      state: stateOf(data, error, () => void refetch()),
      async signIn(credentials) {
        await openSession(credentials);
        // Nothing that another person saw stays behind.
        client.removeQueries({ predicate: isOfAPerson });
        await client.fetchQuery({ queryKey: keys.me, queryFn: readMe, staleTime: 0 });
      },
      async signOut() {
        await closeSession();
        client.setQueryData(keys.me, null);
        client.removeQueries({ predicate: isOfAPerson });
      },
    }),
    [client, data, error, refetch],
  );
  return <SessionContext.Provider value={session}>{children}</SessionContext.Provider>;
}

export function useSession(): Session {
  const session = useContext(SessionContext);
  if (!session) throw new Error('useSession outside of SessionProvider');
  return session;
}

/** The signed-in person; only for screens that nobody else sees. */
export function useMe(): Me | null {
  const { state } = useSession();
  return state.kind === 'signedIn' ? state.me : null;
}

const PUBLIC = [keys.me[0], keys.demoSignIns[0], keys.health[0]] as readonly unknown[];
const isOfAPerson = ({ queryKey }: { queryKey: readonly unknown[] }) => !PUBLIC.includes(queryKey[0]);

async function readMe({ signal }: { signal?: AbortSignal }): Promise<Me | null> {
  return callEndpoint(getMe, { signal }).catch((error: unknown) => {
    if (error instanceof ApiError && error.status === 401) return null;
    throw error;
  });
}

function stateOf(me: Me | null | undefined, error: Error | null, retry: () => void): SessionState {
  if (me) return { kind: 'signedIn', me };
  if (me === null) return { kind: 'signedOut' };
  return error ? { kind: 'unreachable', error, retry } : { kind: 'unknown' };
}
