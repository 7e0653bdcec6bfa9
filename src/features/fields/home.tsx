import { Redirect } from 'expo-router';

import { useMe } from '../../session/session-provider';

/** Whoever has one field goes straight to its week. */
export function Home() {
  const memberships = useMe()?.memberships ?? [];
  const only = memberships.length === 1 ? memberships[0] : undefined;
  return (
    <Redirect
      href={only ? { pathname: '/fields/[fieldId]', params: { fieldId: only.fieldId } } : '/fields'}
    />
  );
}
