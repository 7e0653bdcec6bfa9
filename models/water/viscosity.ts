/**
 * Viscosity of water.
 *
 *   μ = μ* · μ₀(T̄) · μ₁(T̄, ρ̄),  T̄ = T/647.096 K,  ρ̄ = ρ/322 kg/m³,  μ* = 1 µPa·s
 *
 * Source    IAPWS R12-08, eqs. 10–12, tables 1 and 2; the enhancement near the critical point (μ₂) is left out.
 *           Checked against its table 4.
 * Units     K, kg/m³ → Pa·s
 * Limits    273.15 K ≤ T ≤ 1173.15 K, ρ > 0; outside: RangeError. Pure water.
 */
const BY_TEMPERATURE = [1.67752, 2.20462, 0.6366564, -0.241605] as const;

/** i, j, H_ij of table 2. */
const BY_DENSITY: readonly (readonly [number, number, number])[] = [
  [0, 0, 5.20094e-1],
  [1, 0, 8.50895e-2],
  [2, 0, -1.08374],
  [3, 0, -2.89555e-1],
  [0, 1, 2.22531e-1],
  [1, 1, 9.99115e-1],
  [2, 1, 1.88797],
  [3, 1, 1.26613],
  [5, 1, 1.20573e-1],
  [0, 2, -2.81378e-1],
  [1, 2, -9.06851e-1],
  [2, 2, -7.72479e-1],
  [3, 2, -4.89837e-1],
  [4, 2, -2.5704e-1],
  [0, 3, 1.61913e-1],
  [1, 3, 2.57399e-1],
  [0, 4, -3.25372e-2],
  [3, 4, 6.98452e-2],
  [4, 5, 8.72102e-3],
  [3, 6, -4.35673e-3],
  [5, 6, -5.93264e-4],
];

export function viscosityPaS(temperatureK: number, densityKgPerM3: number): number {
  if (!(temperatureK >= 273.15 && temperatureK <= 1173.15)) {
    throw new RangeError(`temperature ${temperatureK} K lies outside 273.15 to 1173.15 K`);
  }
  if (!(densityKgPerM3 > 0)) throw new RangeError(`density ${densityKgPerM3} kg/m³ is not above 0`);
  const reduced = temperatureK / 647.096;
  const dense = densityKgPerM3 / 322;
  const dilute = BY_TEMPERATURE.reduce((sum, h, i) => sum + h / reduced ** i, 0);
  const residual = BY_DENSITY.reduce(
    (sum, [i, j, h]) => sum + h * (1 / reduced - 1) ** i * (dense - 1) ** j,
    0,
  );
  return 1e-6 * ((100 * Math.sqrt(reduced)) / dilute) * Math.exp(dense * residual);
}
