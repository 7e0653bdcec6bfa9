/**
 * Time panels for the seismicity integral ∫ e^{g} dt.
 *
 * Between two changes of any rate, g(t) is smooth but bends hard just after the change. Each panel therefore
 * asks for g at a few Chebyshev nodes in s, t = start + length·s² after a change (s else), and from there
 * interpolates g to a finer row of points between which e^{g} is integrated exactly for linear g. Values in
 * between are a linear map of the node values, so the discretised integral is a sum of exponentials of affine
 * functions of the rates with positive weights: the count stays convex exactly, not only in the limit.
 *
 * Source    Trefethen L.N. (2013), Approximation Theory and Approximation Practice, ch. 5 (barycentric formula,
 *           Chebyshev points of the second kind).
 * Units     s
 * Shapes    interpolation: Float64Array((pieces+1) × nodes), row-major
 */
export interface PanelShape {
  /** Positions of the nodes in [0, 1] of the panel's length, both ends included. */
  nodeAt: Float64Array;
  /** Positions of the finer points, both ends included. */
  pointAt: Float64Array;
  nodes: number;
  pieces: number;
  interpolation: Float64Array;
}

export interface Panel {
  shape: PanelShape;
  startS: number;
  lengthS: number;
  /** Index of the panel's first node in the row of all nodes; it is the last node of the panel before. */
  firstNode: number;
}

export interface TimePanels {
  panels: Panel[];
  /** Times of all nodes, ascending. */
  nodeTimeS: Float64Array;
}

/** How finely a panel is cut. */
export interface PanelRule {
  afterChange: { nodes: number; pieces: number };
  smooth: { nodes: number; pieces: number };
}

/**
 * From coarse to fine, with the largest weekly stress change (in units of aσ) that each holds: a zone's weekly count
 * within 0.1 %, even for rates that jump from end to end every week (count-gradient.reference.test.ts).
 */
const RULES: { upTo: number; rule: PanelRule }[] = [
  { upTo: 8, rule: { afterChange: { nodes: 6, pieces: 10 }, smooth: { nodes: 4, pieces: 8 } } },
  { upTo: 20, rule: { afterChange: { nodes: 7, pieces: 14 }, smooth: { nodes: 4, pieces: 8 } } },
  { upTo: 50, rule: { afterChange: { nodes: 8, pieces: 20 }, smooth: { nodes: 5, pieces: 10 } } },
  { upTo: 150, rule: { afterChange: { nodes: 10, pieces: 24 }, smooth: { nodes: 6, pieces: 10 } } },
  { upTo: Infinity, rule: { afterChange: { nodes: 14, pieces: 48 }, smooth: { nodes: 8, pieces: 20 } } },
];

/** @param stressChange largest change of stress within a week, in units of aσ */
export function panelRuleFor(stressChange: number): PanelRule {
  return RULES.find(({ upTo }) => stressChange <= upTo)!.rule;
}

export function panelShape(nodes: number, pieces: number, graded: boolean): PanelShape {
  const power = graded ? 2 : 1;
  const nodeS = Float64Array.from(
    { length: nodes },
    (_, i) => (1 - Math.cos((Math.PI * i) / (nodes - 1))) / 2,
  );
  const pointS = Float64Array.from({ length: pieces + 1 }, (_, i) => i / pieces);
  const weight = nodeS.map((_, i) => (i % 2 === 0 ? 1 : -1) * (i === 0 || i === nodes - 1 ? 0.5 : 1));
  const interpolation = new Float64Array((pieces + 1) * nodes);
  pointS.forEach((s, point) => {
    const exact = nodeS.findIndex((node) => Math.abs(node - s) < 1e-13);
    const row = interpolation.subarray(point * nodes, (point + 1) * nodes);
    if (exact >= 0) {
      row[exact] = 1;
      return;
    }
    let sum = 0;
    for (let i = 0; i < nodes; i++) sum += row[i] = weight[i] / (s - nodeS[i]);
    for (let i = 0; i < nodes; i++) row[i] /= sum;
  });
  return {
    nodeAt: nodeS.map((s) => s ** power),
    pointAt: pointS.map((s) => s ** power),
    nodes,
    pieces,
    interpolation,
  };
}

/**
 * Panels that cover the given intervals one after the other.
 *
 * @param edgesS ascending ends of the intervals, at least two
 * @param changed whether a rate changes at the start of each interval (one entry per interval)
 */
export function buildPanels(
  edgesS: readonly number[],
  changed: readonly boolean[],
  rule: PanelRule,
): TimePanels {
  const graded = panelShape(rule.afterChange.nodes, rule.afterChange.pieces, true);
  const smooth = panelShape(rule.smooth.nodes, rule.smooth.pieces, false);
  const panels: Panel[] = [];
  const times: number[] = [edgesS[0]];
  for (let interval = 0; interval + 1 < edgesS.length; interval++) {
    const shape = changed[interval] ? graded : smooth;
    const startS = edgesS[interval];
    const lengthS = edgesS[interval + 1] - startS;
    panels.push({ shape, startS, lengthS, firstNode: times.length - 1 });
    for (let node = 1; node < shape.nodes; node++) {
      times.push(node === shape.nodes - 1 ? edgesS[interval + 1] : startS + lengthS * shape.nodeAt[node]);
    }
  }
  return { panels, nodeTimeS: Float64Array.from(times) };
}
