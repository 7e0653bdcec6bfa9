import type { PointM } from '../scenario/types';

/**
 * Whether a point lies inside a polygon (even–odd rule, the polygon closes itself).
 *
 * Source    Ray casting: Shimrat M. (1962), Algorithm 112, Comm. ACM 5(8), 434.
 * Limits    A point exactly on an edge belongs to one of the two sides only, whichever the rule gives.
 */
export function isInsidePolygon(xM: number, yM: number, polygon: readonly PointM[]): boolean {
  let inside = false;
  for (let i = 0, j = polygon.length - 1; i < polygon.length; j = i++) {
    const [xi, yi] = polygon[i];
    const [xj, yj] = polygon[j];
    if (yi > yM !== yj > yM && xM < ((xj - xi) * (yM - yi)) / (yj - yi) + xi) inside = !inside;
  }
  return inside;
}

const turn = (a: PointM, b: PointM, c: PointM) =>
  (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);

/**
 * Whether a barrier piece crosses the segment between two cell centres.
 *
 * A barrier that passes exactly through a centre is taken to lie on its far side (`>= 0` against `< 0`), so
 * that a barrier along a row of centres closes one row of faces and not two. The ends of the barrier itself
 * count as part of it.
 */
export function crossesSegment(from: PointM, to: PointM, start: PointM, end: PointM): boolean {
  const centreA = turn(start, end, from);
  const centreB = turn(start, end, to);
  if (centreA >= 0 === centreB >= 0) return false;
  const barrierA = turn(from, to, start);
  const barrierB = turn(from, to, end);
  return !((barrierA > 0 && barrierB > 0) || (barrierA < 0 && barrierB < 0));
}

/** Area enclosed by a polygon without crossings, m² (0 where all points lie on one line). */
export function polygonArea(polygon: readonly PointM[]): number {
  let twice = 0;
  for (let i = 0, j = polygon.length - 1; i < polygon.length; j = i++) {
    twice += polygon[j][0] * polygon[i][1] - polygon[i][0] * polygon[j][1];
  }
  return Math.abs(twice) / 2;
}
