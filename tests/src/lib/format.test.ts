import { describe, expect, it } from 'vitest';

import {
  about,
  ago,
  bar,
  chance,
  counted,
  dateName,
  heat,
  inWords,
  joulesFromMegawattHours,
  listed,
  litresChange,
  litresPerSecond,
  megawattHours,
  multiple,
  percent,
  significant,
  tickText,
  weekName,
  wholeMegawattHours,
} from '../../../src/lib/format';

describe('three significant figures', () => {
  it.each([
    [0, '0'],
    [1.0714, '1.07'],
    [1, '1.00'],
    [12.449, '12.4'],
    [109.2, '109'],
    [3412, '3,410'],
    [0.001234, '0.00123'],
    [-2.5, '−2.50'],
    // Rounding that carries into the next power of ten must not leave a fourth figure behind.
    [9.996, '10.0'],
    [0.9999, '1.00'],
    [999.7, '1,000'],
  ])('%f reads %s', (value, text) => expect(significant(value)).toBe(text));

  it('shows a dash where there is no number', () => expect(significant(NaN)).toBe('–'));
});

describe('units', () => {
  // 1 MWh = 3.6 GJ, exact by the definitions of hour and watt.
  it('turns joule into MWh, and into GWh from ten of them on', () => {
    expect(heat(3.6e9 * 3412)).toEqual({ value: '3,410', unit: 'MWh' });
    expect(heat(3.6e9 * 9990)).toEqual({ value: '9,990', unit: 'MWh' });
    expect(heat(3.6e9 * 9996)).toEqual({ value: '10.0', unit: 'GWh' });
    expect(heat(3.6e9 * 109_200)).toEqual({ value: '109', unit: 'GWh' });
  });

  it('comes back to the same joule', () => {
    expect(joulesFromMegawattHours(megawattHours(3.2266e13))).toBeCloseTo(3.2266e13, -2);
    expect(wholeMegawattHours(3.6e9 * 8962.8)).toBe('8,963');
  });

  // 1 l/s = 0.001 m³/s; 1 bar = 100,000 Pa.
  it('shows set-points in l/s to the tenth and pressures in bar', () => {
    expect(litresPerSecond(0.0225)).toBe('22.5');
    expect(litresChange(0.0015)).toBe('+1.5');
    expect(litresChange(-0.004)).toBe('−4.0');
    expect(litresChange(-0.00001)).toBe('0.0');
    expect(inWords(bar(2.341e7))).toBe('234\u202fbar');
  });

  it('puts a thin space between number and unit', () => {
    expect(inWords(multiple(1.0714))).toBe('1.07\u202f×');
    expect(inWords(percent(0.0043, 2))).toBe('0.43\u202f%');
  });
});

describe('words', () => {
  it('never calls a chance certain or impossible when it is not', () => {
    expect(chance(0.00001)).toBe('under 0.1\u202f%');
    expect(chance(0.99999)).toBe('over 99.9\u202f%');
    expect(chance(0.333)).toBe('33\u202f%');
  });

  it('names weeks by the site, whatever the zone of the reader', () => {
    // Monday 7 December 2026, 00:00 in Berlin is still Sunday in UTC.
    const monday = Date.UTC(2026, 11, 6, 23);
    expect(weekName(monday, 'Europe/Berlin')).toBe('7 Dec');
    expect(weekName(monday, 'UTC')).toBe('6 Dec');
    expect(dateName(Date.UTC(2026, 8, 7), 'UTC')).toBe('7 Sep 2026');
  });

  it('estimates without pretending', () => {
    expect(about(2)).toBe('a few seconds');
    expect(about(22)).toBe('about 20 seconds');
    expect(about(64)).toBe('about a minute');
    expect(about(190)).toBe('about 3 minutes');
  });

  it('counts, lists and ages', () => {
    expect(counted(1, 'week')).toBe('one week');
    expect(counted(12, 'week')).toBe('12 weeks');
    expect(listed(['A', 'B', 'C'])).toBe('A, B and C');
    expect(ago(0, 3 * 86_400_000)).toBe('3 days ago');
    expect(ago(0, 30_000)).toBe('just now');
    expect(tickText(8)).toBe('8');
    expect(tickText(9200)).toBe('9,200');
  });
});
