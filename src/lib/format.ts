/**
 * How numbers, times and words look, in one place. Forecasts have three significant figures, set-points have
 * the tenth of a litre that an operator dials in, times are those of the site.
 */
import { JOULE_PER, M3_PER_S_PER, PASCAL_PER } from '../../models/units';

/** Between a number and its unit; it neither breaks nor stretches. */
export const THIN_SPACE = '\u202f';
const MINUS = '−';
const NONE = '–';

const LOCALE = 'en-GB';
const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

/** A number as it is shown, and its unit, so that the unit can be set smaller. */
export interface Quantity {
  value: string;
  unit: string;
}

export const inWords = ({ value, unit }: Quantity): string =>
  unit === '' ? value : `${value}${THIN_SPACE}${unit}`;

/** Three significant figures without an exponent: 1.07, 12.4, 3,410. */
export function significant(value: number, figures = 3): string {
  if (!Number.isFinite(value)) return NONE;
  if (value === 0) return '0';
  // Rounded first, so that 9.996 becomes 10.0 and not 10.00.
  const rounded = Number(value.toPrecision(figures));
  const decimals = Math.max(0, figures - 1 - Math.floor(Math.log10(Math.abs(rounded))));
  return fixed(rounded, Math.min(decimals, 8));
}

/** A round number on an axis: 0.5, 2, 9,200. */
export const tickText = (value: number): string =>
  (value < 0 ? MINUS : '') + Math.abs(value).toLocaleString(LOCALE, { maximumSignificantDigits: 6 });

export function fixed(value: number, decimals: number): string {
  const text = Math.abs(value).toLocaleString(LOCALE, {
    minimumFractionDigits: decimals,
    maximumFractionDigits: decimals,
  });
  const isZero = !/[1-9]/.test(text);
  return value < 0 && !isZero ? MINUS + text : text;
}

/** A rate of earthquakes against the background: 1.07 ×. */
export const multiple = (value: number): Quantity => ({ value: significant(value), unit: '×' });

/** Heat in MWh, in GWh from ten of them on. */
export function heat(joule: number): Quantity {
  const isLarge = Math.abs(joule) >= 10 * JOULE_PER.GWh * (1 - 5e-4);
  const unit = isLarge ? 'GWh' : 'MWh';
  return { value: significant(joule / JOULE_PER[unit]), unit };
}

export const megawattHours = (joule: number): number => joule / JOULE_PER.MWh;
export const joulesFromMegawattHours = (value: number): number => value * JOULE_PER.MWh;

/** Whole MWh, for targets that people type and compare. */
export const wholeMegawattHours = (joule: number): string => fixed(megawattHours(joule), 0);

/** A set-point in l/s. */
export const litresPerSecond = (rateM3PerS: number): string => fixed(rateM3PerS / M3_PER_S_PER['l/s'], 1);

/** A change of set-point with its sign: +1.5, −0.5, 0.0. */
export function litresChange(rateM3PerS: number): string {
  const text = litresPerSecond(rateM3PerS);
  return text.startsWith(MINUS) || !/[1-9]/.test(text) ? text : `+${text}`;
}

export const bar = (pressurePa: number): Quantity => ({
  value: significant(pressurePa / PASCAL_PER.bar),
  unit: 'bar',
});

export const barValue = (pressurePa: number): number => pressurePa / PASCAL_PER.bar;

export const percent = (fraction: number, figures = 3): Quantity => ({
  value: significant(fraction * 100, figures),
  unit: '%',
});

/** A chance, never shown as certain or impossible when it is not. */
export function chance(fraction: number): string {
  if (fraction > 0 && fraction < 0.001) return `under 0.1${THIN_SPACE}%`;
  if (fraction < 1 && fraction > 0.999) return `over 99.9${THIN_SPACE}%`;
  return inWords(percent(fraction, 2));
}

/** "one week", "12 weeks". */
export const counted = (count: number, one: string, many = `${one}s`): string =>
  count === 1 ? `one ${one}` : `${count.toLocaleString(LOCALE)} ${many}`;

/** "12 Jan", the name of a week on an axis and in a table. */
export const weekName = (at: number, timeZone: string): string =>
  day(at, timeZone, { day: 'numeric', month: 'short' });

/** "12 Jan 2027". */
export const dateName = (at: number, timeZone?: string): string =>
  day(at, timeZone, { day: 'numeric', month: 'short', year: 'numeric' });

/** "Mon 12 Jan 2027". */
export const weekdayName = (at: number, timeZone: string): string =>
  day(at, timeZone, { weekday: 'short', day: 'numeric', month: 'short', year: 'numeric' }).replace(',', '');

/** "12 Jan 2027, 14:05". */
export const momentName = (at: number, timeZone?: string): string =>
  day(at, timeZone, {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
  });

function day(at: number, timeZone: string | undefined, options: Intl.DateTimeFormatOptions): string {
  // British English writes "Sept"; three letters keep axes and columns even.
  return new Intl.DateTimeFormat(LOCALE, { ...options, timeZone }).format(at).replace('Sept', 'Sep');
}

/** "just now", "5 minutes ago", "3 days ago". */
export function ago(at: number, nowAt: number): string {
  const elapsed = Math.max(0, nowAt - at);
  if (elapsed < 2 * MINUTE_MS) return 'just now';
  if (elapsed < 2 * HOUR_MS) return `${Math.round(elapsed / MINUTE_MS)} minutes ago`;
  if (elapsed < 2 * DAY_MS) return `${Math.round(elapsed / HOUR_MS)} hours ago`;
  return `${Math.round(elapsed / DAY_MS)} days ago`;
}

/** "about 20 seconds", "about 3 minutes": an estimate that does not pretend to more. */
export function about(seconds: number): string {
  if (seconds < 4) return 'a few seconds';
  if (seconds < 55) return `about ${Math.max(5, Math.round(seconds / 5) * 5)} seconds`;
  const minutes = Math.round(seconds / 60);
  return minutes <= 1 ? 'about a minute' : `about ${minutes} minutes`;
}

/** "A, B and C". */
export function listed(words: readonly string[]): string {
  if (words.length <= 1) return words[0] ?? '';
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}
