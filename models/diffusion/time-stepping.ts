/**
 * Pressure by implicit time-stepping: the route that knows no response library, used to check finished plans.
 *
 *   M p' = −A p + b(t), b constant between changes of the rates, p = 0 before the first
 *
 * Method    TR-BDF2 (L-stable, order 2), step halved or doubled on its own ladder by the embedded error
 *           estimate, smoothed by one more solve because the estimate is stiff. Steps begin short after each
 *           change. Order 2 (tests/models/verification/mode-decay.convergence.test.ts).
 * Source    Bank et al. (1985), IEEE Trans. CAD 4(4), 436–451; error estimate and smoothing: Hosea & Shampine
 *           (1996), Appl. Numer. Math. 20, 21–37.
 * Units     p Pa · times s · b m³/s
 * Limits    a step below a second that still misses the tolerance throws NumericalError
 */
import { NumericalError, StoppedError } from '../errors';
import type { DiffusionOperator } from './operator';

const GAMMA = 2 - Math.SQRT2;
const ERROR_CONSTANT = (-3 * GAMMA * GAMMA + 4 * GAMMA - 2) / (12 * (2 - GAMMA));
const SHORTEST_STEP_S = 1;
const MOST_FACTORS = 32;

export interface SteppingOptions {
  /** Largest accepted error of a step, Pa, in the largest norm. */
  tolerancePa: number;
  firstStepS: number;
  /** A step is at most this share of the time since the last change (and at least the first step). */
  shareSinceChange: number;
  longestStepS: number;
  shouldStop?: () => boolean;
}

/** Called with the pressure at the middle stage and at the end of each accepted step. */
export type OnStage = (pressure: Float64Array, lengthS: number, endS: number) => void;

/**
 * Steps from `fromS` to the last of `edgesS`; the sources change only at edges.
 *
 * @param edgesS ascending ends of the intervals
 * @param sourceOf fills the cells' sources (m³/s) for the interval that starts at the given edge index
 */
export function stepPressure(
  operator: DiffusionOperator,
  pressure: Float64Array,
  edgesS: readonly number[],
  sourceOf: (interval: number, source: Float64Array) => void,
  options: SteppingOptions,
  onStage: OnStage,
): { steps: number } {
  const { size } = operator;
  const storage = operator.grid.storageM3PerPa;
  const source = new Float64Array(size);
  const slopeStart = new Float64Array(size); // −A p + b, m³/s
  const slopeMiddle = new Float64Array(size);
  const slopeEnd = new Float64Array(size);
  const middle = new Float64Array(size);
  const end = new Float64Array(size);
  const error = new Float64Array(size);
  const slope = (p: Float64Array, out: Float64Array) => {
    operator.apply(p, out);
    for (let i = 0; i < size; i++) out[i] = source[i] - out[i];
  };
  const sourceBefore = new Float64Array(size);
  const usedShifts = new Set<number>();
  let ladderS = options.firstStepS;
  let changedAtS = edgesS[0];
  let steps = 0;

  for (let interval = 0; interval + 1 < edgesS.length; interval++) {
    const untilS = edgesS[interval + 1];
    let nowS = edgesS[interval];
    sourceBefore.set(source);
    source.fill(0);
    sourceOf(interval, source);
    slope(pressure, slopeStart);
    // Only a change of the rates starts the short steps again.
    if (interval === 0 || source.some((value, i) => value !== sourceBefore[i])) {
      ladderS = options.firstStepS;
      changedAtS = nowS;
    }
    while (nowS < untilS) {
      if (options.shouldStop?.()) throw new StoppedError();
      const restS = untilS - nowS;
      // What would leave a crumb is taken whole.
      const stepS = ladderS * 1.5 >= restS ? restS : ladderS;
      const shiftS = (GAMMA * stepS) / 2;
      usedShifts.add(shiftS);
      if (usedShifts.size > MOST_FACTORS) {
        operator.releaseFactors();
        usedShifts.clear();
        usedShifts.add(shiftS);
      }
      for (let i = 0; i < size; i++)
        middle[i] = storage[i] * pressure[i] + shiftS * (slopeStart[i] + source[i]);
      operator.solveShifted(shiftS, middle);
      const fromMiddle = 1 / (GAMMA * (2 - GAMMA));
      const fromStart = -((1 - GAMMA) ** 2) / (GAMMA * (2 - GAMMA));
      for (let i = 0; i < size; i++) {
        end[i] = storage[i] * (fromMiddle * middle[i] + fromStart * pressure[i]) + shiftS * source[i];
      }
      operator.solveShifted(shiftS, end);
      slope(middle, slopeMiddle);
      slope(end, slopeEnd);
      for (let i = 0; i < size; i++) {
        error[i] =
          2 *
          ERROR_CONSTANT *
          stepS *
          (slopeStart[i] / GAMMA - slopeMiddle[i] / (GAMMA * (1 - GAMMA)) + slopeEnd[i] / (1 - GAMMA));
      }
      operator.solveShifted(shiftS, error);
      let largest = 0;
      for (let i = 0; i < size; i++) largest = Math.max(largest, Math.abs(error[i]));
      if (!(largest <= options.tolerancePa)) {
        if (stepS / 2 < SHORTEST_STEP_S)
          throw new NumericalError('time-stepping cannot reach its accuracy', { stepS, largest });
        ladderS = stepS / 2;
        continue;
      }
      onStage(middle, GAMMA * stepS, nowS + GAMMA * stepS);
      nowS = stepS === restS ? untilS : nowS + stepS;
      onStage(end, (1 - GAMMA) * stepS, nowS);
      pressure.set(end);
      slopeStart.set(slopeEnd);
      steps++;
      const allowedS = Math.min(options.longestStepS, options.shareSinceChange * (nowS - changedAtS));
      if (largest < options.tolerancePa / 8 && 2 * ladderS <= allowedS) ladderS *= 2;
    }
  }
  operator.releaseFactors();
  return { steps };
}
