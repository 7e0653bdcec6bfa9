/**
 * Weeks of a site: they start on its local Monday 00:00, so a week with a clock change has 167 or 169 hours.
 * A moment is UTC milliseconds, a zone is an IANA name.
 */
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

const formats = new Map<string, Intl.DateTimeFormat>();

function formatFor(timeZone: string): Intl.DateTimeFormat {
  let format = formats.get(timeZone);
  if (!format) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone,
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
      second: 'numeric',
    });
    formats.set(timeZone, format);
  }
  return format;
}

/** The wall clock of a site, as if it were UTC. */
function wallClock(at: number, timeZone: string): number {
  const parts = Object.fromEntries(
    formatFor(timeZone)
      .formatToParts(at)
      .map((part) => [part.type, Number(part.value)]),
  ) as Record<'year' | 'month' | 'day' | 'hour' | 'minute' | 'second', number>;
  return Date.UTC(parts.year, parts.month - 1, parts.day, parts.hour, parts.minute, parts.second);
}

/** The moment at which a site's clock shows `wall`; where it is shown twice or never, one within the hour. */
function momentOf(wall: number, timeZone: string): number {
  let at = wall;
  // Twice, because the first guess may lie on the other side of a clock change.
  for (let round = 0; round < 2; round++) at += wall - wallClock(at, timeZone);
  return at;
}

/** Start of the week that `at` lies in. */
export function weekStartOf(at: number, timeZone: string): number {
  const midnight = Math.floor(wallClock(at, timeZone) / DAY_MS) * DAY_MS;
  const daysSinceMonday = (new Date(midnight).getUTCDay() + 6) % 7;
  return momentOf(midnight - daysSinceMonday * DAY_MS, timeZone);
}

/** Start of the week that lies `weeks` after (before, when negative) the one that starts at `weekStartsAt`. */
export function addWeeks(weekStartsAt: number, weeks: number, timeZone: string): number {
  return momentOf(wallClock(weekStartsAt, timeZone) + weeks * 7 * DAY_MS, timeZone);
}

export function isWeekStart(at: number, timeZone: string): boolean {
  return weekStartOf(at, timeZone) === at;
}

/** Calendar weeks from one week start to another. */
export function weeksBetween(fromAt: number, toAt: number, timeZone: string): number {
  return Math.round((wallClock(toAt, timeZone) - wallClock(fromAt, timeZone)) / (7 * DAY_MS));
}

/** "7 December 2026", for sentences. */
export function dayInWords(at: number, timeZone: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone,
    day: 'numeric',
    month: 'long',
    year: 'numeric',
  }).format(at);
}
