/** One rounding rule for everything on the screen: three significant figures for forecasts, set-points to their step. */
import { JOULE_PER, M3_PER_S_PER, PASCAL_PER } from '../../models/units';

/** Thin space between a number and its unit. */
export const THIN = '\u2009';
const MINUS = '\u2212';

const grouped = (value: number, decimals: number) =>
  value
    .toLocaleString('en-GB', { minimumFractionDigits: decimals, maximumFractionDigits: decimals })
    .replace('-', MINUS);

/** Three significant figures, no exponent: 1.07, 12.3, 0.00412, 3,410. */
export function figure(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(digits));
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(rounded))));
  return grouped(rounded, Math.min(decimals, 8));
}

/** "1.07 ×" */
export const multiple = (value: number | null) => (value === null ? '–' : `${figure(value)}${THIN}×`);

/** Set-points are shown to a tenth of a litre per second. */
export const rateFigure = (m3PerS: number) => grouped(m3PerS / M3_PER_S_PER['l/s'], 1);
export const rate = (m3PerS: number) => `${rateFigure(m3PerS)}${THIN}l/s`;

/** A change with its sign: "+2.5", "−8.0", "0". */
export function rateChange(m3PerS: number): string {
  const litres = m3PerS / M3_PER_S_PER['l/s'];
  if (Math.abs(litres) < 0.05) return '0';
  return `${litres > 0 ? '+' : ''}${grouped(litres, 1)}`;
}

export const energyFigure = (joule: number) => grouped(joule / JOULE_PER.MWh, 0);
export const energy = (joule: number) => `${energyFigure(joule)}${THIN}MWh`;

export const pressureFigure = (pascal: number) => grouped(pascal / PASCAL_PER.bar, 1);
export const pressure = (pascal: number) => `${pressureFigure(pascal)}${THIN}bar`;

/** "0.12 %", "96 %"; a gap never reads as exactly nothing. */
export function percent(share: number, digits = 2): string {
  if (share !== 0 && Math.abs(share) < 1e-4) return `under 0.01${THIN}%`;
  return `${figure(100 * share, digits)}${THIN}%`;
}

const inZone = (timeZone: string, options: Intl.DateTimeFormatOptions) =>
  new Intl.DateTimeFormat('en-GB', { timeZone, ...options });

/** "12 Jan" */
export const day = (at: number, timeZone: string) =>
  inZone(timeZone, { day: 'numeric', month: 'short' }).format(at);

/** "Mon 12 Jan 2026" */
export const fullDay = (at: number, timeZone: string) =>
  inZone(timeZone, { weekday: 'short', day: 'numeric', month: 'short', year: 'numeric' })
    .format(at)
    .replace(',', '');

/** "12 Jan, 14:05" */
export const moment = (at: number, timeZone: string) =>
  inZone(timeZone, { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' }).format(at);

/** "3 hours ago", "2 days ago", "just now". */
export function age(at: number, now: number): string {
  const seconds = (now - at) / 1000;
  const words = new Intl.RelativeTimeFormat('en-GB', { numeric: 'always' });
  if (seconds < 90) return 'just now';
  if (seconds < 90 * 60) return words.format(-Math.round(seconds / 60), 'minute');
  if (seconds < 36 * 3600) return words.format(-Math.round(seconds / 3600), 'hour');
  return words.format(-Math.round(seconds / 86_400), 'day');
}

/** "about 2 minutes", "a few seconds". */
export function duration(seconds: number): string {
  if (seconds < 10) return 'a few seconds';
  if (seconds < 90) return `about ${Math.round(seconds / 10) * 10} seconds`;
  return `about ${Math.round(seconds / 60)} minutes`;
}
