import { expect, it } from 'vitest';

import { addWeeks, weeksBetween } from '../../../src/lib/weeks';

const HOUR_MS = 3_600_000;

it('keeps to the local Monday over a change of clocks', () => {
  // Berlin left summer time on 25 October 2026, so that week had 169 hours.
  const before = Date.UTC(2026, 9, 18, 22);
  const after = addWeeks(before, 1, 'Europe/Berlin');
  expect(after - before).toBe(169 * HOUR_MS);
  expect(addWeeks(after, -1, 'Europe/Berlin')).toBe(before);
  expect(weeksBetween(before, addWeeks(before, 30, 'Europe/Berlin'), 'Europe/Berlin')).toBe(30);
});
