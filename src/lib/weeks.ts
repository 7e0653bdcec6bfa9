/** Weeks of a site start on its local Monday 00:00; one with a clock change has 167 or 169 hours. */
const DAY_MS = 86_400_000;

/** The site's wall clock, as if it were UTC. */
function wallClock(at: number, timeZone: string): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  }).formatToParts(at);
  const part = (type: string) => Number(parts.find((candidate) => candidate.type === type)?.value);
  return Date.UTC(part('year'), part('month') - 1, part('day'), part('hour'), part('minute'), part('second'));
}

/** Start of the week that lies `weeks` after (before, when negative) the one that starts at `weekStartsAt`. */
export function addWeeks(weekStartsAt: number, weeks: number, timeZone: string): number {
  const wall = wallClock(weekStartsAt, timeZone) + weeks * 7 * DAY_MS;
  let at = wall;
  // Twice, because the first guess may lie on the other side of a clock change.
  for (let round = 0; round < 2; round++) at += wall - wallClock(at, timeZone);
  return at;
}

/** Calendar weeks from one week start to another. */
export function weeksBetween(fromAt: number, toAt: number, timeZone: string): number {
  return Math.round((wallClock(toAt, timeZone) - wallClock(fromAt, timeZone)) / (7 * DAY_MS));
}
