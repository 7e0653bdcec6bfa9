/**
 * Density, enthalpy and heat capacity of liquid water.
 *
 *   γ(π, τ) = Σ n_i (7.1 − π)^I_i (τ − 1.222)^J_i,   π = p/16.53 MPa,  τ = 1386 K/T
 *   v = RT/p · π γ_π,   h = RT · τ γ_τ,   c_p = −R τ² γ_ττ
 *
 * Source    IAPWS R7-97(2012), Revised Release on the Industrial Formulation 1997, region 1, eq. 7 and table 2.
 *           Checked against its table 5 (tests/models/verification/water.reference.test.ts).
 * Units     T K · p Pa · density kg/m³ · enthalpy J/kg · heat capacity J/(kg·K)
 * Limits    273.15 K ≤ T ≤ 623.15 K, saturation pressure ≤ p ≤ 100 MPa; pure water (a brine of 10 % by weight holds
 *           10 to 12 % less heat a kilogram). Outside: RangeError.
 */
import { saturationPressurePa } from './saturation';

const GAS_CONSTANT = 461.526;
const REFERENCE_PA = 16.53e6;
const REFERENCE_K = 1386;

/** I, J, n of table 2. */
const TERMS: readonly (readonly [number, number, number])[] = [
  [0, -2, 0.14632971213167],
  [0, -1, -0.84548187169114],
  [0, 0, -0.3756360367204e1],
  [0, 1, 0.33855169168385e1],
  [0, 2, -0.95791963387872],
  [0, 3, 0.15772038513228],
  [0, 4, -0.16616417199501e-1],
  [0, 5, 0.81214629983568e-3],
  [1, -9, 0.28319080123804e-3],
  [1, -7, -0.60706301565874e-3],
  [1, -1, -0.18990068218419e-1],
  [1, 0, -0.32529748770505e-1],
  [1, 1, -0.21841717175414e-1],
  [1, 3, -0.5283835796993e-4],
  [2, -3, -0.47184321073267e-3],
  [2, 0, -0.30001780793026e-3],
  [2, 1, 0.47661393906987e-4],
  [2, 3, -0.44141845330846e-5],
  [2, 17, -0.72694996297594e-15],
  [3, -4, -0.31679644845054e-4],
  [3, 0, -0.28270797985312e-5],
  [3, 6, -0.85205128120103e-9],
  [4, -5, -0.22425281908e-5],
  [4, -2, -0.65171222895601e-6],
  [4, 10, -0.14341729937924e-12],
  [5, -8, -0.40516996860117e-6],
  [8, -11, -0.12734301741641e-8],
  [8, -6, -0.17424871230634e-9],
  [21, -29, -0.68762131295531e-18],
  [23, -31, 0.14478307828521e-19],
  [29, -38, 0.26335781662795e-22],
  [30, -39, -0.11947622640071e-22],
  [31, -40, 0.18228094581404e-23],
  [32, -41, -0.93537087292458e-25],
];

export interface LiquidWater {
  densityKgPerM3: number;
  enthalpyJPerKg: number;
  heatCapacityJPerKgK: number;
}

export function liquidWater(temperatureK: number, pressurePa: number): LiquidWater {
  checkRange(temperatureK, pressurePa);
  const pi = pressurePa / REFERENCE_PA;
  const tau = REFERENCE_K / temperatureK;
  const a = 7.1 - pi;
  const b = tau - 1.222;
  let byPi = 0;
  let byTau = 0;
  let byTauTwice = 0;
  for (const [i, j, n] of TERMS) {
    if (i !== 0) byPi -= n * i * a ** (i - 1) * b ** j;
    byTau += n * a ** i * j * b ** (j - 1);
    byTauTwice += n * a ** i * j * (j - 1) * b ** (j - 2);
  }
  return {
    densityKgPerM3: pressurePa / (GAS_CONSTANT * temperatureK * pi * byPi),
    enthalpyJPerKg: GAS_CONSTANT * temperatureK * tau * byTau,
    heatCapacityJPerKgK: -GAS_CONSTANT * tau * tau * byTauTwice,
  };
}

function checkRange(temperatureK: number, pressurePa: number): void {
  if (!(temperatureK >= 273.15 && temperatureK <= 623.15)) {
    throw new RangeError(`temperature ${temperatureK} K lies outside 273.15 to 623.15 K`);
  }
  if (!(pressurePa <= 100e6)) throw new RangeError(`pressure ${pressurePa} Pa lies above 100 MPa`);
  const boilingPa = saturationPressurePa(temperatureK);
  if (!(pressurePa >= boilingPa)) {
    throw new RangeError(
      `at ${temperatureK} K water boils below ${Math.ceil(boilingPa)} Pa; ${pressurePa} Pa is not liquid`,
    );
  }
}

/**
 * Heat delivered per cubic metre produced, cooled before it goes back: ρ(T_prod, p)·[h(T_prod, p) − h(T_back, p)].
 *
 * Units J/m³ at production conditions: volume is metered hot, so the density is that of the hot side.
 */
export function heatPerProducedVolumeJPerM3(
  producedK: number,
  reinjectedK: number,
  pressurePa: number,
): number {
  const produced = liquidWater(producedK, pressurePa);
  const reinjected = liquidWater(reinjectedK, pressurePa);
  return produced.densityKgPerM3 * (produced.enthalpyJPerKg - reinjected.enthalpyJPerKg);
}
