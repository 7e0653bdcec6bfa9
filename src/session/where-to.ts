import type { Href } from 'expo-router';

/** Where to go after signing in. Only addresses of this application: never one that somebody put into a link. */
export function whereTo(from: string | string[] | undefined): Href {
  const path = Array.isArray(from) ? from[0] : from;
  const isOurs = path !== undefined && /^\/(?![/\\])/.test(path) && !path.startsWith('/sign-in');
  return (isOurs ? path : '/') as Href;
}
