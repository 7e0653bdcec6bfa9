import { Platform } from 'react-native';

/** Path and query on the screen. The browser knows them before the router has gone all the way there. */
export function currentAddress(): string {
  return Platform.OS === 'web' ? window.location.pathname + window.location.search : '/';
}
