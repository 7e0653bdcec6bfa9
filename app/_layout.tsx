import { Slot } from 'expo-router';

import { AppRoot } from '@/ui/app-root';

export default function RootLayout() {
  return (
    <AppRoot>
      <Slot />
    </AppRoot>
  );
}
