/**
 * Seismicity rate of one cell by rate-and-state nucleation, in the log domain.
 *
 *   dR/dt = (R/t_a)(τ̇/τ̇₀ − R),  t_a = aσ/τ̇₀,  g(t) = t/t_a + f [p(t) − p(0)]/aσ
 *   R(t) = R₀ e^{g(t)}/F(t),  N(t) = r₀ t_a ln F(t),  F(t) = 1 + (R₀/t_a) ∫₀ᵗ e^{g} ds
 *
 * Kept as two logarithms, ln R and ln F, moved from panel to panel:
 *   ln F ← ln F + softplus(ln(R₀/t_a) + ln∫e^{g} − ln F), whose increment times r₀ t_a is the expected count.
 *
 * Source    Dieterich (1994), JGR 99(B2) 2601–2618; Segall & Lu (2015), JGR Solid Earth 120, 5082–5103;
 *           closed form: Heimisson & Segall (2018), JGR Solid Earth 123, 4141–4156.
 * Units     times s · stress Pa · rates relative to the background
 * Limits    constant aσ; pore pressure at constant total stress (poroelastic and thermal stress left out)
 */
import type { SeismicitySpec } from '../scenario/types';
import { SECONDS_PER_YEAR } from '../constants';

export interface RateStateParameters {
  /** t_a = aσ/τ̇₀. */
  relaxationS: number;
  /** f/aσ: what a pascal of overpressure adds to g. */
  stressPerPa: number;
}

export function rateStateParameters(seismicity: SeismicitySpec): RateStateParameters {
  return {
    relaxationS: (seismicity.aSigmaPa / seismicity.stressingRatePaPerYear) * SECONDS_PER_YEAR,
    stressPerPa: seismicity.friction / seismicity.aSigmaPa,
  };
}

/**
 * ln F over a step in which g rises linearly by `rise`: ln(1 + (R/t_a) Δt (e^{rise} − 1)/rise).
 * The expected events of the step are r₀ t_a times it.
 */
export function logFOverLinearStep(
  logRate: number,
  rise: number,
  lengthS: number,
  relaxationS: number,
): number {
  let logMean: number; // ln((e^rise − 1)/rise)
  if (Math.abs(rise) < 1e-4) logMean = rise / 2 + (rise * rise) / 24;
  else if (rise > 30) logMean = rise - Math.log(rise) + Math.log1p(-Math.exp(-rise));
  else if (rise < -30) logMean = -Math.log(-rise) + Math.log1p(-Math.exp(rise));
  else logMean = Math.log(Math.expm1(rise) / rise);
  const exponent = logRate + Math.log(lengthS / relaxationS) + logMean;
  return exponent > 36 ? exponent : Math.log1p(Math.exp(exponent));
}
