/**
 * Units of people against SI, in one place: `toSi` multiplies, `fromSi` divides.
 * The only runtime file of models that the client may import.
 *
 * Source: BIPM, The International System of Units, 9th ed. (2019), tables 4 and 8 (bar, litre, hour, day);
 * psi from NIST SP 811 (2008), appendix B.8.
 */
export const PASCAL_PER = { Pa: 1, kPa: 1e3, MPa: 1e6, bar: 1e5, psi: 6894.757 } as const;
export const M3_PER_S_PER = { 'm³/s': 1, 'l/s': 1e-3, 'm³/h': 1 / 3600, 'm³/d': 1 / 86_400 } as const;
export const KG_PER_S_PER = { 'kg/s': 1, 't/h': 1 / 3.6 } as const;
export const JOULE_PER = { J: 1, MJ: 1e6, GJ: 1e9, kWh: 3.6e6, MWh: 3.6e9, GWh: 3.6e12 } as const;
export const SECOND_PER = { s: 1, h: 3600, d: 86_400, week: 604_800 } as const;

export type PressureUnit = keyof typeof PASCAL_PER;
export type VolumeRateUnit = keyof typeof M3_PER_S_PER;
export type EnergyUnit = keyof typeof JOULE_PER;

/** Absolute zero offset, exact by definition. */
export const KELVIN_AT_ZERO_CELSIUS = 273.15;

export const kelvinFromCelsius = (celsius: number) => celsius + KELVIN_AT_ZERO_CELSIUS;
export const celsiusFromKelvin = (kelvin: number) => kelvin - KELVIN_AT_ZERO_CELSIUS;
export const kelvinFromFahrenheit = (fahrenheit: number) =>
  ((fahrenheit - 32) * 5) / 9 + KELVIN_AT_ZERO_CELSIUS;
