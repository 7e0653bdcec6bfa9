import { Roboto_400Regular } from '@expo-google-fonts/roboto/400Regular';
import { Roboto_500Medium } from '@expo-google-fonts/roboto/500Medium';
import { Roboto_700Bold } from '@expo-google-fonts/roboto/700Bold';

/** Shipped with the application: nothing is asked of another server. */
export const FONT_FILES = { Roboto_400Regular, Roboto_500Medium, Roboto_700Bold };

export const FONT = {
  regular: 'Roboto_400Regular',
  medium: 'Roboto_500Medium',
  bold: 'Roboto_700Bold',
} as const satisfies Record<string, keyof typeof FONT_FILES>;
