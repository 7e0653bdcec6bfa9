/**
 * Pressure at which water boils.
 *
 *   β²ϑ² + n₁β²ϑ + n₂β² + n₃βϑ² + n₄βϑ + n₅β + n₆ϑ² + n₇ϑ + n₈ = 0,  β = (p/1 MPa)^¼,  ϑ = T + n₉/(T − n₁₀)
 *
 * Source    IAPWS R7-97(2012), region 4, eq. 30 and table 34. Checked against its table 35.
 * Units     K → Pa
 * Limits    273.15 K ≤ T ≤ 647.096 K; outside: RangeError
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
