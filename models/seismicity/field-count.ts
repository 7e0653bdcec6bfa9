/**
 * Expected events of all cells over a row of time panels, and their gradient by the field's coefficients.
 *
 *   g(x, t) = (t − t₀)/t_a + Σ_k ψ_k(x) c_k(t) − u₀(x),   u₀(x) = Σ_k ψ_k(x) c_k(t₀)   (c carries f/aσ)
 *   N_group = Σ_{x in group} r₀(x) t_a ln F(x)            (rate-state.ts)
 *
 * Method    One pass over the cells in blocks of four: the product ψ·c for all nodes, the panels' integrals,
 *           and, for the gradient (adjoint), the weights ∂N/∂g times ψ added up per node. The gradient is
 *           that of the discretised count, exact to round-off
 *           (tests/models/verification/count-gradient.reference.test.ts).
 * Units     counts in events · coefficients dimensionless · times s
 * Shapes    coefficients: Float64Array(nodes × width), row-major
 */
import type { FieldBasis } from '../diffusion/field-basis';
import type { Background } from './background';
import { logPanelIntegral, panelScratch, softplus } from './exponential-integral';
import type { TimePanels } from './time-panels';

export interface CountResult {
  /** Expected events per panel and group: counts[panel * groups + group]. */
  counts: Float64Array;
  groups: number;
  /** ∂N_group(all panels)/∂c, per group a Float64Array(nodes × width); only when asked for. */
  gradient: Float64Array[] | null;
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
  /** Whether the gradient is wanted. */
  withGradient: boolean;
}

export function countEvents(input: CountInput): CountResult {
  const { basis, background, panels, coefficients, relaxationS, logRateStart } = input;
  const { psi, width } = basis;
  const { nodeTimeS, panels: list } = panels;
  const nodes = nodeTimeS.length;
  const groups = background.groupRatePerS.length;
  const cells = background.cells.length;
  const counts = new Float64Array(list.length * groups);
  const gradient = input.withGradient
    ? Array.from({ length: groups }, () => new Float64Array(nodes * width))
    : null;
  const logRateEnd = new Float64Array(cells);

  const mostNodes = list.reduce((most, panel) => Math.max(most, panel.shape.nodes), 0);
  const scratch = panelScratch(list.reduce((most, panel) => Math.max(most, panel.shape.pieces), 0));
  const g = [0, 1, 2, 3].map(() => new Float64Array(nodes));
  const weight = [0, 1, 2, 3].map(() => new Float64Array(nodes));
  const derivative = gradient ? new Float64Array(list.length * mostNodes) : null;
  const logIntegral = new Float64Array(list.length);
  const backgroundStress = nodeTimeS.map((timeS) => (timeS - nodeTimeS[0]) / relaxationS);
  const logRelaxation = Math.log(relaxationS);

  for (let group = 0; group < groups; group++) {
    const end = background.groupStart[group + 1];
    const groupGradient = gradient ? gradient[group] : null;
    for (let first = background.groupStart[group]; first < end; first += 4) {
      const block = Math.min(4, end - first);
      project(psi, width, coefficients, nodes, first, Math.min(first + 3, cells - 1), g);
      for (let lane = 0; lane < block; lane++) {
        const own = g[lane];
        const atStart = own[0];
        for (let node = 0; node < nodes; node++) own[node] += backgroundStress[node] - atStart;
        const cell = first + lane;
        const start = logRateStart ? logRateStart[cell] : 0;
        const events = background.ratePerS[cell] * relaxationS;
        let logF = 0;
        for (let p = 0; p < list.length; p++) {
          const panel = list[p];
          const integral = logPanelIntegral(
            panel.shape,
            panel.lengthS,
            own,
            panel.firstNode,
            scratch,
            derivative,
            p * mostNodes,
          );
          logIntegral[p] = start - logRelaxation + integral;
          const increment = softplus(logIntegral[p] - logF);
          logF += increment;
          counts[p * groups + group] += events * increment;
        }
        logRateEnd[cell] = start + own[nodes - 1] - logF;
        if (derivative) {
          const row = weight[lane].fill(0);
          for (let p = 0; p < list.length; p++) {
            const share = events * Math.exp(logIntegral[p] - logF);
            const { firstNode, shape } = list[p];
            for (let i = 0; i < shape.nodes; i++) row[firstNode + i] += share * derivative[p * mostNodes + i];
          }
          // u₀ moves with the first node as well.
          let all = 0;
          for (let node = 0; node < nodes; node++) all += row[node];
          row[0] -= all;
        }
      }
      if (groupGradient) {
        for (let lane = block; lane < 4; lane++) weight[lane].fill(0);
        accumulate(psi, width, weight, nodes, first, Math.min(first + 3, cells - 1), groupGradient);
      }
    }
  }
  return { counts, groups, gradient, logRateEnd };
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
  for (let node = 0; node < nodes; node++) {
    const at = node * width;
    let sum0 = 0;
    let sum1 = 0;
    let sum2 = 0;
    let sum3 = 0;
    for (let k = 0; k < width; k++) {
      const c = coefficients[at + k];
      sum0 += psi[row0 + k] * c;
      sum1 += psi[row1 + k] * c;
      sum2 += psi[row2 + k] * c;
      sum3 += psi[row3 + k] * c;
    }
    g0[node] = sum0;
    g1[node] = sum1;
    g2[node] = sum2;
    g3[node] = sum3;
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
  for (let node = 0; node < nodes; node++) {
    const w0 = weight[0][node];
    const w1 = weight[1][node];
    const w2 = weight[2][node];
    const w3 = weight[3][node];
    const at = node * width;
    for (let k = 0; k < width; k++) {
      gradient[at + k] += w0 * psi[row0 + k] + w1 * psi[row1 + k] + w2 * psi[row2 + k] + w3 * psi[row3 + k];
    }
  }
}
