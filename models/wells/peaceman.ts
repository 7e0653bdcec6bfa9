/**
 * Bottom-hole overpressure from the pressure of the well's cell.
 *
 *   p_w = p_cell + q μ/(2πkh) · [ln(r_o/r_w) + skin],   r_o = 0.14 √(Δx² + Δy²)
 *
 * Source    Peaceman D.W. (1978), SPE J. 18(3), 183–194; (1983), SPE J. 23(3), 531–543 (isotropic case).
 * Units     returns Pa per m³/s
 * Limits    isolated, fully penetrating vertical well, isotropic cell; not for two wells in one cell
 */
export function wellDrawdownPaPerM3PerS(well: {
  dxM: number;
  dyM: number;
  radiusM: number;
  skin: number;
  /** k·h/μ of the well's cell, m³/(Pa·s). */
  transmissivity: number;
}): number {
  return (
    (Math.log(equivalentRadiusM(well.dxM, well.dyM) / well.radiusM) + well.skin) /
    (2 * Math.PI * well.transmissivity)
  );
}

export function equivalentRadiusM(dxM: number, dyM: number): number {
  return 0.14 * Math.hypot(dxM, dyM);
}
