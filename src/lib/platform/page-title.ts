import { useEffect } from 'react';
import { Platform } from 'react-native';

const PRODUCT = 'Stillfield';

/** "Plans · Harrow Fen · Stillfield" in the browser's tab and history. */
export function usePageTitle(...parts: (string | undefined)[]): void {
  const title = [...parts.filter(Boolean), PRODUCT].join(' · ');
  useEffect(() => {
    if (Platform.OS === 'web') document.title = title;
  }, [title]);
}
