/**
 * Pressure and temperature at which water boils.
 *
 *   β²ϑ² + n₁β²ϑ + n₂β² + n₃βϑ² + n₄βϑ + n₅β + n₆ϑ² + n₇ϑ + n₈ = 0,  β = (p/1 MPa)^¼,  ϑ = T + n₉/(T − n₁₀)
 *
 * Source    IAPWS R7-97(2012), region 4, eqs. 30 and 31, table 34. Checked against its tables 35 and 36.
 * Units     K → Pa and back
 * Limits    273.15 K ≤ T ≤ 647.096 K, 611.213 Pa ≤ p ≤ 22.064 MPa; outside: RangeError
 */
const N = [
  0.11670521452767e4, -0.72421316703206e6, -0.17073846940092e2, 0.1202082470247e5, -0.32325550322333e7,
  0.1491510861353e2, -0.48232657361591e4, 0.40511340542057e6, -0.23855557567849, 0.65017534844798e3,
] as const;

export function saturationPressurePa(temperatureK: number): number {
  if (!(temperatureK >= 273.15 && temperatureK <= 647.096)) {
    throw new RangeError(`temperature ${temperatureK} K lies outside 273.15 to 647.096 K`);
  }
  const theta = temperatureK + N[8] / (temperatureK - N[9]);
  const a = theta * theta + N[0] * theta + N[1];
  const b = N[2] * theta * theta + N[3] * theta + N[4];
  const c = N[5] * theta * theta + N[6] * theta + N[7];
  return ((2 * c) / (-b + Math.sqrt(b * b - 4 * a * c))) ** 4 * 1e6;
}

export function saturationTemperatureK(pressurePa: number): number {
  if (!(pressurePa >= 611.213 && pressurePa <= 22.064e6)) {
    throw new RangeError(`pressure ${pressurePa} Pa lies outside 611.213 Pa to 22.064 MPa`);
  }
  const beta = (pressurePa / 1e6) ** 0.25;
  const e = beta * beta + N[2] * beta + N[5];
  const f = N[0] * beta * beta + N[3] * beta + N[6];
  const g = N[1] * beta * beta + N[4] * beta + N[7];
  const d = (2 * g) / (-f - Math.sqrt(f * f - 4 * e * g));
  const sum = N[9] + d;
  return (sum - Math.sqrt(sum * sum - 4 * (N[8] + N[9] * d))) / 2;
}
