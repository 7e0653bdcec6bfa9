import { useEffect, useState } from 'react';

const MINUTE_MS = 60_000;

/** The time, to the minute: for ages of what is on the screen. */
export function useNow(): number {
  const [nowAt, setNowAt] = useState(() => Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNowAt(Date.now()), MINUTE_MS);
    return () => clearInterval(timer);
  }, []);
  return nowAt;
}
