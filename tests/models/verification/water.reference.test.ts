import { describe, expect, it } from 'vitest';

import { heatPerProducedVolumeJPerM3, liquidWater } from '../../../models/water/liquid-water';
import { saturationPressurePa, saturationTemperatureK } from '../../../models/water/saturation';
import { viscosityPaS } from '../../../models/water/viscosity';

const relative = (value: number, expected: number) => Math.abs(value / expected - 1);

describe('liquid water', () => {
  // IAPWS R7-97(2012), table 5: T/K, p/MPa, v m³/kg, h kJ/kg, cp kJ/(kg K); all printed digits.
  it.each([
    [300, 3, 0.100215168e-2, 0.115331273e3, 0.417301218e1],
    [300, 80, 0.971180894e-3, 0.184142828e3, 0.401008987e1],
    [500, 3, 0.1202418e-2, 0.975542239e3, 0.465580682e1],
  ])('at %f K and %f MPa', (temperatureK, megapascal, volume, enthalpy, heatCapacity) => {
    const water = liquidWater(temperatureK, megapascal * 1e6);
    expect(relative(1 / water.densityKgPerM3, volume)).toBeLessThan(1e-8);
    expect(relative(water.enthalpyJPerKg, enthalpy * 1e3)).toBeLessThan(1e-8);
    expect(relative(water.heatCapacityJPerKgK, heatCapacity * 1e3)).toBeLessThan(1e-8);
  });

  // Computed from the same formulation with 25 digits: °C, MPa, kg/m³, kJ/kg, kJ/(kg K), µPa·s (IAPWS R12-08).
  it.each([
    [20, 0.1, 998.2055, 84.01181, 4.184798, 1001.597],
    [70, 2, 978.6132, 294.6278, 4.183955, 404.049],
    [100, 10, 962.9316, 426.548, 4.194477, 284.246],
    [140, 2, 927.0187, 590.2631, 4.281205, 197.065],
    [140, 20, 936.4158, 602.1069, 4.231977, 201.626],
    [160, 2, 908.2746, 676.3817, 4.332999, 170.781],
  ])('at %f °C and %f MPa', (celsius, megapascal, density, enthalpy, heatCapacity, viscosity) => {
    const water = liquidWater(celsius + 273.15, megapascal * 1e6);
    expect(relative(water.densityKgPerM3, density)).toBeLessThan(1e-7);
    expect(relative(water.enthalpyJPerKg, enthalpy * 1e3)).toBeLessThan(1e-7);
    expect(relative(water.heatCapacityJPerKgK, heatCapacity * 1e3)).toBeLessThan(2e-7);
    const microPascalSeconds = 1e6 * viscosityPaS(celsius + 273.15, water.densityKgPerM3);
    expect(Math.abs(microPascalSeconds - viscosity)).toBeLessThan(5.1e-4);
  });

  it('delivers heat by mass: 70 kg/s from 140 to 70 °C at 2 MPa are 20.69447 MW', () => {
    const cubicMetresPerS = 70 / liquidWater(413.15, 2e6).densityKgPerM3;
    const watts = cubicMetresPerS * heatPerProducedVolumeJPerM3(413.15, 343.15, 2e6);
    expect(relative(watts, 20.69447e6)).toBeLessThan(1e-6);
    expect(relative(watts * 604_800, 12516.0e9)).toBeLessThan(1e-5);
  });

  it('is lighter hot: 80 l/s at 140 °C and 2 MPa are 74.1615 kg/s, and 75.7822 l/s at 70 °C', () => {
    const kgPerS = 0.08 * liquidWater(413.15, 2e6).densityKgPerM3;
    expect(relative(kgPerS, 74.1615)).toBeLessThan(1e-6);
    expect(relative(kgPerS / liquidWater(343.15, 2e6).densityKgPerM3, 0.0757822)).toBeLessThan(1e-6);
  });

  it('refuses what is not liquid or not covered', () => {
    expect(() => liquidWater(413.15, 0.3e6)).toThrow(/boils/);
    expect(() => liquidWater(250, 1e6)).toThrow(RangeError);
    expect(() => liquidWater(300, 101e6)).toThrow(/100 MPa/);
    expect(() => liquidWater(NaN, 1e6)).toThrow(RangeError);
  });
});

describe('saturation', () => {
  // IAPWS R7-97(2012), table 35.
  it.each([
    [300, 0.353658941e-2],
    [500, 0.263889776e1],
    [600, 0.123443146e2],
  ])('at %f K', (temperatureK, megapascal) => {
    expect(relative(saturationPressurePa(temperatureK), megapascal * 1e6)).toBeLessThan(1e-8);
  });

  // IAPWS R7-97(2012), table 36.
  it.each([
    [0.1, 372.755919],
    [1, 453.035632],
    [10, 584.149488],
  ])('at %f MPa', (megapascal, temperatureK) => {
    expect(relative(saturationTemperatureK(megapascal * 1e6), temperatureK)).toBeLessThan(2e-9);
  });

  // Computed from the same formulation with 25 digits.
  it.each([
    [140, 0.361500962],
    [160, 0.6181391967],
  ])('at %f °C, and back', (celsius, megapascal) => {
    const pressurePa = saturationPressurePa(celsius + 273.15);
    expect(relative(pressurePa, megapascal * 1e6)).toBeLessThan(2e-9);
    expect(relative(saturationTemperatureK(pressurePa), celsius + 273.15)).toBeLessThan(1e-11);
  });

  it('refuses what has no boiling point', () => {
    expect(() => saturationPressurePa(650)).toThrow(RangeError);
    expect(() => saturationPressurePa(NaN)).toThrow(RangeError);
    expect(() => saturationTemperatureK(600)).toThrow(/611.213/);
    expect(() => saturationTemperatureK(23e6)).toThrow(RangeError);
  });
});

describe('viscosity', () => {
  // IAPWS R12-08, table 4 (without the critical enhancement): K, kg/m³, µPa·s.
  it.each([
    [298.15, 998, 889.7351],
    [298.15, 1200, 1437.649467],
    [373.15, 1000, 307.883622],
    [433.15, 1, 14.538324],
    [433.15, 1000, 217.685358],
    [873.15, 1, 32.619287],
    [873.15, 100, 35.802262],
    [873.15, 600, 77.430195],
    [1173.15, 1, 44.217245],
    [1173.15, 100, 47.640433],
    [1173.15, 400, 64.154608],
  ])('at %f K and %f kg/m³', (temperatureK, density, microPascalSeconds) => {
    // All printed digits.
    expect(Math.abs(1e6 * viscosityPaS(temperatureK, density) - microPascalSeconds)).toBeLessThan(5.1e-7);
  });

  it('refuses what it does not cover', () => {
    expect(() => viscosityPaS(200, 998)).toThrow(RangeError);
    expect(() => viscosityPaS(300, 0)).toThrow(RangeError);
  });
});
