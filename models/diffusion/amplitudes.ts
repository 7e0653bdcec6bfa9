/**
 * Amplitudes of a well's modes under a row of constant-rate steps: exact in time.
 *
 *   a(t + Δ) = a(t) e^{−λΔ} + β q (1 − e^{−λΔ})/λ
 *
 * Units     as in response-library.ts · rates m³/s, injection positive · times s
 */
import type { WellResponse } from './response-library';

/** A signed rate that holds from `fromS` until the next step. */
export interface RateStep {
  fromS: number;
  rateM3PerS: number;
}

/** Moves the amplitudes on by `durationS` at one rate, in place. */
export function advance(
  well: WellResponse,
  amplitude: Float64Array,
  rateM3PerS: number,
  durationS: number,
): void {
  for (let k = 0; k < well.count; k++) {
    const decay = well.decayPerS[k];
    const exponent = decay * durationS;
    // One exponential serves both terms; as in `stepFactor`, t for λ → 0.
    const lost = Math.expm1(-exponent);
    const gained = exponent < 1e-12 ? durationS : -lost / decay;
    amplitude[k] += amplitude[k] * lost + well.input[k] * rateM3PerS * gained;
  }
}

/**
 * Amplitudes at each of the times, from rest before the first step.
 *
 * @param steps ascending; the rate before the first is 0
 * @param timesS ascending
 * @returns Float64Array(times × modes), row-major
 */
export function amplitudesAt(
  well: WellResponse,
  steps: readonly RateStep[],
  timesS: ArrayLike<number>,
): Float64Array {
  const rows = new Float64Array(timesS.length * well.count);
  const amplitude = new Float64Array(well.count);
  let step = 0;
  let nowS = steps.length > 0 ? steps[0].fromS : 0;
  let rate = 0;
  for (let at = 0; at < timesS.length; at++) {
    const targetS = timesS[at];
    while (step < steps.length && steps[step].fromS < targetS) {
      if (steps[step].fromS > nowS) {
        advance(well, amplitude, rate, steps[step].fromS - nowS);
        nowS = steps[step].fromS;
      }
      rate = steps[step].rateM3PerS;
      step++;
    }
    if (targetS > nowS) {
      advance(well, amplitude, rate, targetS - nowS);
      nowS = targetS;
    }
    rows.set(amplitude, at * well.count);
  }
  return rows;
}
