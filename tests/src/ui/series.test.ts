import { expect, it } from 'vitest';

import { extentOf, niceTicks } from '../../../src/ui/chart/series';

it('finds the extent of every kind of series', () => {
  expect(
    extentOf([
      { kind: 'line', color: '', points: [{ at: 0, value: 2 }] },
      { kind: 'band', color: '', points: [{ at: 0, low: -1, high: 3 }] },
      { kind: 'level', color: '', value: 7 },
    ]),
  ).toEqual([-1, 7]);
});

it('puts round ticks around the values', () => {
  expect(niceTicks(0, 7.3, 4)).toEqual([0, 2, 4, 6, 8]);
  expect(niceTicks(8963, 9425, 4)).toEqual([8800, 9000, 9200, 9400, 9600]);
  // A flat line still gets an axis.
  expect(niceTicks(1, 1, 4).length).toBeGreaterThan(1);
});
