import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import { addWeeks, dayInWords, isWeekStart, weeksBetween, weekStartOf } from '../../server/time/local-week';

const HOUR_MS = 3_600_000;
const at = (text: string) => Date.parse(text);

/** Offsets from the IANA time zone database: Berlin +1 (+2 in summer), Auckland +13 (+12 in winter), Kathmandu +5:45. */
describe('a week starts on the local Monday at midnight', () => {
  test.each([
    ['Europe/Berlin', '2026-12-03T10:00:00Z', '2026-11-29T23:00:00Z'],
    ['Europe/Berlin', '2026-07-05T21:59:59Z', '2026-06-28T22:00:00Z'],
    ['Europe/Berlin', '2026-07-05T22:00:00Z', '2026-07-05T22:00:00Z'],
    ['Pacific/Auckland', '2026-12-06T12:00:00Z', '2026-12-06T11:00:00Z'],
    ['Asia/Kathmandu', '2026-12-06T18:15:00Z', '2026-12-06T18:15:00Z'],
    ['Asia/Kathmandu', '2026-12-06T18:14:59Z', '2026-11-29T18:15:00Z'],
    ['UTC', '2026-01-01T00:00:00Z', '2025-12-29T00:00:00Z'],
  ])('%s, %s', (zone, moment, start) => {
    expect(new Date(weekStartOf(at(moment), zone)).toISOString()).toBe(new Date(at(start)).toISOString());
  });
});

test('a week with a clock change has 167 or 169 hours', () => {
  const hours = (start: string) => (addWeeks(at(start), 1, 'Europe/Berlin') - at(start)) / HOUR_MS;
  // The clocks of 2026 change on 29 March and 25 October.
  expect(hours('2026-03-22T23:00:00Z')).toBe(167);
  expect(hours('2026-10-18T22:00:00Z')).toBe(169);
  expect(hours('2026-11-29T23:00:00Z')).toBe(168);
});

const zone = fc.constantFrom(
  'Europe/Berlin',
  'America/Los_Angeles',
  'Pacific/Auckland',
  'Asia/Kathmandu',
  'UTC',
);
const moment = fc.integer({ min: at('2000-01-01T00:00:00Z'), max: at('2040-01-01T00:00:00Z') });

test('any moment lies in its own week', () => {
  fc.assert(
    fc.property(moment, zone, (now, timeZone) => {
      const start = weekStartOf(now, timeZone);
      expect(isWeekStart(start, timeZone)).toBe(true);
      expect(start).toBeLessThanOrEqual(now);
      expect(addWeeks(start, 1, timeZone)).toBeGreaterThan(now);
    }),
  );
});

test('weeks are counted back and forth over clock changes', () => {
  fc.assert(
    fc.property(moment, zone, fc.integer({ min: -60, max: 60 }), (now, timeZone, weeks) => {
      const start = weekStartOf(now, timeZone);
      const other = addWeeks(start, weeks, timeZone);
      expect(weeksBetween(start, other, timeZone)).toBe(weeks);
      expect(isWeekStart(other, timeZone)).toBe(true);
      expect(addWeeks(other, -weeks, timeZone)).toBe(start);
    }),
  );
});

test('a day in words is the day at the site', () => {
  expect(dayInWords(at('2026-12-06T23:00:00Z'), 'Europe/Berlin')).toBe('7 December 2026');
});
