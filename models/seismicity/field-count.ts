/**
 * Expected events of all cells over a row of time panels, and their gradient by the field's coefficients.
 *
 *   g(x, t) = (t − t₀)/t_a + Σ_k φ_k(x) c_k(t) − u₀(x),   u₀(x) = Σ_k φ_k(x) c_k(t₀)   (c carries f/aσ)
 *   N_group = Σ_{x in group} r₀(x) t_a ln F(x)            (rate-state.ts)
 *
 * Method    Block by block (field-basis.ts), four cells at a time: g at all nodes, the panels' integrals, and, for
 *           the gradient (adjoint), the weights ∂N/∂g times the block's shapes added up per node. The gradient is
 *           that of the discretised count, exact to round-off
 *           (tests/models/verification/count-gradient.reference.test.ts).
 * Units     counts in events · coefficients dimensionless · times s
 * Shapes    coefficients: Float64Array(nodes × width), row-major
 */
import {
  addMixedGradient,
  mixCoefficients,
  type FieldBasis,
  type FieldBlock,
} from '../diffusion/field-basis';
import type { Background } from './background';
import { logPanelIntegral, panelScratch, softplus, type PanelScratch } from './exponential-integral';
import type { TimePanels } from './time-panels';

export interface CountResult {
  /** Expected events per panel and group: counts[panel * groups + group]. */
  counts: Float64Array;
  groups: number;
  /** Expected events of each part of the background over all panels. */
  partEvents: Float64Array;
  /** ∂N_part(first panels)/∂c: gradients[end][part], a Float64Array(nodes × width) each, in the order asked for. */
  gradients: Float64Array[][];
  /** ln R of each cell at the end of the last panel. */
  logRateEnd: Float64Array;
}

export interface CountInput {
  basis: FieldBasis;
  background: Background;
  panels: TimePanels;
  coefficients: Float64Array;
  relaxationS: number;
  /** ln R of each cell at the first node; background (0) where absent. */
  logRateStart: Float64Array | null;
  /** For each wanted gradient, how many panels it counts. */
  gradientEnds: readonly number[];
}

export function countEvents(input: CountInput): CountResult {
  const { basis, background, panels, coefficients } = input;
  const { width } = basis;
  const { blockPart, partGroup } = background;
  const groups = background.groupRatePerS.length;
  const nodes = panels.nodeTimeS.length;
  const parts = partGroup.length;
  const result: CountResult = {
    counts: new Float64Array(panels.panels.length * groups),
    groups,
    partEvents: new Float64Array(parts),
    gradients: input.gradientEnds.map(() =>
      Array.from({ length: parts }, () => new Float64Array(nodes * width)),
    ),
    logRateEnd: new Float64Array(background.cells.length),
  };
  const work = workSpace(input);
  basis.blocks.forEach((block, index) => {
    const part = blockPart[index];
    const mixed = mixCoefficients(block, coefficients, width);
    const byMixed = input.gradientEnds.map(() => new Float64Array(nodes * block.rank));
    result.partEvents[part] += countBlock(input, block, mixed, partGroup[part], work, result, byMixed);
    byMixed.forEach((values, end) => addMixedGradient(block, values, result.gradients[end][part], width));
  });
  return result;
}

interface WorkSpace {
  /** g of four cells, and its weights in each gradient: weight[end][lane]. */
  g: Float64Array[];
  weight: Float64Array[][];
  derivative: Float64Array | null;
  logIntegral: Float64Array;
  /** ln F after each panel. */
  logFAfter: Float64Array;
  /** (t − t₀)/t_a at each node. */
  backgroundStress: Float64Array;
  scratch: PanelScratch;
  mostNodes: number;
}

function workSpace({ panels, relaxationS, gradientEnds }: CountInput): WorkSpace {
  const { nodeTimeS, panels: list } = panels;
  const mostNodes = list.reduce((most, panel) => Math.max(most, panel.shape.nodes), 0);
  const lanes = () => [0, 1, 2, 3].map(() => new Float64Array(nodeTimeS.length));
  return {
    g: lanes(),
    weight: gradientEnds.map(lanes),
    derivative: gradientEnds.length > 0 ? new Float64Array(list.length * mostNodes) : null,
    logIntegral: new Float64Array(list.length),
    logFAfter: new Float64Array(list.length),
    backgroundStress: nodeTimeS.map((timeS) => (timeS - nodeTimeS[0]) / relaxationS),
    scratch: panelScratch(list.reduce((most, panel) => Math.max(most, panel.shape.pieces), 0)),
    mostNodes,
  };
}

/** Counts one block's events into `result` and returns their sum; `byMixed` receives the gradient. */
function countBlock(
  { background, panels, relaxationS, logRateStart, gradientEnds }: CountInput,
  block: FieldBlock,
  mixed: Float64Array,
  group: number,
  { g, weight, derivative, logIntegral, logFAfter, backgroundStress, scratch, mostNodes }: WorkSpace,
  { counts, groups, logRateEnd }: CountResult,
  byMixed: readonly Float64Array[],
): number {
  const { rank, shapes } = block;
  const list = panels.panels;
  const nodes = panels.nodeTimeS.length;
  const logRelaxation = Math.log(relaxationS);
  const lastRow = block.end - block.first - 1;
  let sum = 0;
  for (let first = block.first; first < block.end; first += 4) {
    const lanes = Math.min(4, block.end - first);
    const row = first - block.first;
    project(shapes, rank, mixed, nodes, row, Math.min(row + 3, lastRow), g);
    for (let lane = 0; lane < lanes; lane++) {
      const own = g[lane];
      const atStart = own[0];
      for (let node = 0; node < nodes; node++) own[node] += backgroundStress[node] - atStart;
      const cell = first + lane;
      const start = logRateStart ? logRateStart[cell] : 0;
      const events = background.ratePerS[cell] * relaxationS;
      let logF = 0;
      for (let p = 0; p < list.length; p++) {
        const { shape, lengthS, firstNode } = list[p];
        const integral = logPanelIntegral(shape, lengthS, own, firstNode, scratch, derivative, p * mostNodes);
        logIntegral[p] = start - logRelaxation + integral;
        const increment = softplus(logIntegral[p] - logF);
        logF += increment;
        logFAfter[p] = logF;
        counts[p * groups + group] += events * increment;
      }
      sum += events * logF;
      logRateEnd[cell] = start + own[nodes - 1] - logF;
      for (let end = 0; derivative && end < gradientEnds.length; end++) {
        const panelCount = gradientEnds[end];
        const weights = weight[end][lane].fill(0);
        const logFEnd = logFAfter[panelCount - 1];
        let all = 0;
        for (let p = 0; p < panelCount; p++) {
          const share = events * Math.exp(logIntegral[p] - logFEnd);
          const { firstNode, shape } = list[p];
          for (let i = 0; i < shape.nodes; i++) {
            const value = share * derivative[p * mostNodes + i];
            weights[firstNode + i] += value;
            all += value;
          }
        }
        // u₀ moves with the first node as well.
        weights[0] -= all;
      }
    }
    for (let end = 0; end < gradientEnds.length; end++) {
      for (let lane = lanes; lane < 4; lane++) weight[end][lane].fill(0);
      accumulate(shapes, rank, weight[end], nodes, row, Math.min(row + 3, lastRow), byMixed[end]);
    }
  }
  return sum;
}

/** g[lane][node] = ψ(first + lane) · c(node), for four cells at once (those past `last` repeat it). */
function project(
  psi: Float64Array,
  width: number,
  coefficients: Float64Array,
  nodes: number,
  first: number,
  last: number,
  g: Float64Array[],
): void {
  const row0 = first * width;
  const row1 = Math.min(first + 1, last) * width;
  const row2 = Math.min(first + 2, last) * width;
  const row3 = Math.min(first + 3, last) * width;
  const [g0, g1, g2, g3] = g;
  // Two nodes at a time: each ψ is fetched once for both.
  for (let node = 0; node < nodes; node += 2) {
    const next = Math.min(node + 1, nodes - 1);
    const at = node * width;
    const atNext = next * width;
    let a0 = 0;
    let a1 = 0;
    let a2 = 0;
    let a3 = 0;
    let b0 = 0;
    let b1 = 0;
    let b2 = 0;
    let b3 = 0;
    for (let k = 0; k < width; k++) {
      const c = coefficients[at + k];
      const d = coefficients[atNext + k];
      const psi0 = psi[row0 + k];
      const psi1 = psi[row1 + k];
      const psi2 = psi[row2 + k];
      const psi3 = psi[row3 + k];
      a0 += psi0 * c;
      a1 += psi1 * c;
      a2 += psi2 * c;
      a3 += psi3 * c;
      b0 += psi0 * d;
      b1 += psi1 * d;
      b2 += psi2 * d;
      b3 += psi3 * d;
    }
    g0[node] = a0;
    g1[node] = a1;
    g2[node] = a2;
    g3[node] = a3;
    g0[next] = b0;
    g1[next] = b1;
    g2[next] = b2;
    g3[next] = b3;
  }
}

/** gradient(node) += Σ_lane weight[lane][node] · ψ(first + lane). */
function accumulate(
  psi: Float64Array,
  width: number,
  weight: Float64Array[],
  nodes: number,
  first: number,
  last: number,
  gradient: Float64Array,
): void {
  const row0 = first * width;
  const row1 = Math.min(first + 1, last) * width;
  const row2 = Math.min(first + 2, last) * width;
  const row3 = Math.min(first + 3, last) * width;
  const [weight0, weight1, weight2, weight3] = weight;
  let node = 0;
  for (; node + 1 < nodes; node += 2) {
    const a0 = weight0[node];
    const a1 = weight1[node];
    const a2 = weight2[node];
    const a3 = weight3[node];
    const b0 = weight0[node + 1];
    const b1 = weight1[node + 1];
    const b2 = weight2[node + 1];
    const b3 = weight3[node + 1];
    const at = node * width;
    const atNext = at + width;
    for (let k = 0; k < width; k++) {
      const psi0 = psi[row0 + k];
      const psi1 = psi[row1 + k];
      const psi2 = psi[row2 + k];
      const psi3 = psi[row3 + k];
      gradient[at + k] += a0 * psi0 + a1 * psi1 + a2 * psi2 + a3 * psi3;
      gradient[atNext + k] += b0 * psi0 + b1 * psi1 + b2 * psi2 + b3 * psi3;
    }
  }
  if (node < nodes) {
    const at = node * width;
    for (let k = 0; k < width; k++) {
      gradient[at + k] +=
        weight0[node] * psi[row0 + k] +
        weight1[node] * psi[row1 + k] +
        weight2[node] * psi[row2 + k] +
        weight3[node] * psi[row3 + k];
    }
  }
}
