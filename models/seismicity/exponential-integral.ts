/**
 * ∫ e^{g} dt over a panel in the log domain, and its derivative by the node values of g.
 *
 *   ∫ over a piece with g linear from a to b:  Δt (e^b − e^a)/(b − a)
 *
 * Method    g at the panel's points from its nodes (time-panels.ts), each piece exact for linear g; everything
 *           relative to the largest g of the panel, so that |g| of several hundred neither overflows nor
 *           loses the answer.
 * Units     g dimensionless · times s · returns ln(s)
 */
import type { PanelShape } from './time-panels';

/** Work space for one panel; made once, used for every cell. */
export interface PanelScratch {
  point: Float64Array;
  exponential: Float64Array;
  pointWeight: Float64Array;
}

export function panelScratch(mostPieces: number): PanelScratch {
  return {
    point: new Float64Array(mostPieces + 1),
    exponential: new Float64Array(mostPieces + 1),
    pointWeight: new Float64Array(mostPieces + 1),
  };
}

/**
 * ln ∫ e^{g} dt over the panel.
 *
 * @param g node values, `shape.nodes` of them from `offset` on
 * @param derivative where given, receives ∂ ln∫ / ∂ g_node for the panel's nodes, from `derivativeOffset` on
 */
export function logPanelIntegral(
  shape: PanelShape,
  lengthS: number,
  g: Float64Array,
  offset: number,
  scratch: PanelScratch,
  derivative: Float64Array | null,
  derivativeOffset = 0,
): number {
  const { nodes, pieces, interpolation, pointAt } = shape;
  const { point, exponential, pointWeight } = scratch;
  let largest = -Infinity;
  for (let p = 0, entry = 0; p <= pieces; p++) {
    let value = 0;
    for (let i = 0; i < nodes; i++) value += interpolation[entry++] * g[offset + i];
    point[p] = value;
    if (value > largest) largest = value;
  }
  for (let p = 0; p <= pieces; p++) exponential[p] = Math.exp(point[p] - largest);
  let sum = 0;
  if (derivative) pointWeight.fill(0, 0, pieces + 1);
  for (let p = 0; p < pieces; p++) {
    const width = (pointAt[p + 1] - pointAt[p]) * lengthS;
    const rise = point[p + 1] - point[p];
    const before = exponential[p];
    const after = exponential[p + 1];
    let mean: number;
    let byBefore: number;
    let byAfter: number;
    if (Math.abs(rise) < 0.02) {
      // Taylor series of the exact expressions, which cancel for small rises; the next term is below 1e-13.
      const d = rise;
      mean = before * (1 + d * (1 / 2 + d * (1 / 6 + d * (1 / 24 + d * (1 / 120 + d / 720)))));
      byBefore = before * (1 / 2 + d * (1 / 6 + d * (1 / 24 + d * (1 / 120 + d * (1 / 720 + d / 5040)))));
      byAfter = before * (1 / 2 + d * (1 / 3 + d * (1 / 8 + d * (1 / 30 + d * (1 / 144 + d / 840)))));
    } else {
      mean = (after - before) / rise;
      byBefore = (mean - before) / rise;
      byAfter = (after - mean) / rise;
    }
    sum += width * mean;
    if (derivative) {
      pointWeight[p] += width * byBefore;
      pointWeight[p + 1] += width * byAfter;
    }
  }
  if (derivative) {
    const inverse = 1 / sum;
    for (let i = 0; i < nodes; i++) derivative[derivativeOffset + i] = 0;
    for (let p = 0, entry = 0; p <= pieces; p++) {
      const weight = pointWeight[p] * inverse;
      for (let i = 0; i < nodes; i++) derivative[derivativeOffset + i] += interpolation[entry++] * weight;
    }
  }
  return largest + Math.log(sum);
}

/** ln(1 + e^x) without overflow. */
export function softplus(x: number): number {
  return x > 0 ? x + Math.log1p(Math.exp(-x)) : Math.log1p(Math.exp(x));
}
