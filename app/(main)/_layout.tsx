import { Slot } from 'expo-router';

import { SignedInOnly } from '@/session/signed-in-only';

export default function MainLayout() {
  return (
    <SignedInOnly>
      <Slot />
    </SignedInOnly>
  );
}
