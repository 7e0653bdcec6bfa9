/**
 * Small readers for untrusted JSON that note every offending value with its path instead of stopping at the first.
 *
 * A reader gives back a usable value or a harmless stand-in (NaN, '', []) after noting why: NaN fails no further
 * comparison, so one mistake is reported once.
 */
import type { InputIssue } from '../errors';

export type Issues = InputIssue[];
export type Reader<T> = (value: unknown, path: string, issues: Issues) => T;

export interface NumberLimits {
  /** Smallest and largest allowed value. */
  min?: number;
  max?: number;
  /** Open lower end: the value must lie above it. */
  above?: number;
  /** Open upper end. */
  below?: number;
  whole?: boolean;
  /** Follows the range in messages, e.g. "m³/s". */
  unit?: string;
}

export function number(limits: NumberLimits = {}): Reader<number> {
  const range = describeRange(limits);
  return (value, path, issues) => {
    const fail = (why: string) => {
      issues.push({ path, message: why });
      return NaN;
    };
    if (typeof value !== 'number') return fail(`must be a number${range}, not ${describe(value)}`);
    if (!Number.isFinite(value)) return fail(`must be a finite number${range}`);
    if (limits.whole && !Number.isInteger(value)) return fail(`must be a whole number${range}, not ${value}`);
    const { min = -Infinity, max = Infinity, above = -Infinity, below = Infinity } = limits;
    const isInside = value >= min && value <= max && (value > above || above === -Infinity) && value < below;
    return isInside ? value : fail(`must be a number${range}, not ${value}`);
  };
}

function describeRange({ min, max, above, below, unit }: NumberLimits): string {
  const parts: string[] = [];
  if (min !== undefined) parts.push(`at least ${min}`);
  if (above !== undefined) parts.push(`above ${above}`);
  if (max !== undefined) parts.push(`at most ${max}`);
  if (below !== undefined) parts.push(`below ${below}`);
  return parts.length === 0 ? '' : ` ${parts.join(' and ')}${unit ? ` ${unit}` : ''}`;
}

export function text(mostCharacters = 80): Reader<string> {
  return (value, path, issues) => {
    if (typeof value === 'string' && value.trim() !== '' && value.length <= mostCharacters) return value;
    const got = typeof value === 'string' && value.length > mostCharacters ? 'a longer one' : describe(value);
    issues.push({ path, message: `must be a text of 1 to ${mostCharacters} characters, not ${got}` });
    return '';
  };
}

export const flag: Reader<boolean> = (value, path, issues) => {
  if (typeof value === 'boolean') return value;
  issues.push({ path, message: `must be true or false, not ${describe(value)}` });
  return false;
};

export function oneOf<T extends string>(...choices: readonly T[]): Reader<T> {
  return (value, path, issues) => {
    const found = choices.find((choice) => choice === value);
    if (found !== undefined) return found;
    issues.push({
      path,
      message: `must be one of ${choices.map((choice) => `"${choice}"`).join(', ')}, not ${describe(value)}`,
    });
    return choices[0];
  };
}

export function orNull<T>(reader: Reader<T>): Reader<T | null> {
  return (value, path, issues) => (value === null ? null : reader(value, path, issues));
}

export function list<T>(item: Reader<T>, { least = 0, most = Infinity } = {}): Reader<T[]> {
  return (value, path, issues) => {
    if (!Array.isArray(value)) {
      issues.push({ path, message: `must be a list, not ${describe(value)}` });
      return [];
    }
    if (value.length < least || value.length > most) {
      const range = most === Infinity ? `at least ${least}` : `${least} to ${most}`;
      issues.push({ path, message: `must have ${range} entries, not ${value.length}` });
      return [];
    }
    return value.map((entry, index) => item(entry, `${path}[${index}]`, issues));
  };
}

/** A key of an object: how to read it and, where it may be absent, what stands for it. */
export interface Key<T> {
  read: Reader<T>;
  absent?: () => T;
}

export const required = <T>(read: Reader<T>): Key<T> => ({ read });
export const optional = <T>(read: Reader<T>, absent: T): Key<T> => ({ read, absent: () => absent });

/** An object with exactly these keys: an unknown one is an error, so that a typing mistake never goes unseen. */
export function object<T extends object>(keys: { [K in keyof T]: Key<T[K]> }): Reader<T> {
  const names = Object.keys(keys) as (keyof T & string)[];
  return (value, path, issues) => {
    const isObject = typeof value === 'object' && value !== null && !Array.isArray(value);
    if (!isObject) issues.push({ path, message: `must be an object, not ${describe(value)}` });
    const given = (isObject ? value : {}) as Record<string, unknown>;
    for (const name of Object.keys(given)) {
      if (!Object.hasOwn(keys, name))
        issues.push({ path: child(path, name), message: unknownKey(name, names) });
    }
    const result: Partial<T> = {};
    for (const name of names) {
      const { read, absent } = keys[name];
      // What stands in a place that is no object at all was reported already.
      const noted = isObject ? issues : [];
      if (Object.hasOwn(given, name)) result[name] = read(given[name], child(path, name), noted);
      else if (absent) result[name] = absent();
      else {
        noted.push({ path: child(path, name), message: 'is missing' });
        result[name] = read(undefined, child(path, name), []);
      }
    }
    return result as T;
  };
}

const child = (path: string, name: string) =>
  /^[A-Za-z_]\w*$/.test(name) ? `${path}.${name}` : `${path}[${JSON.stringify(name)}]`;

function unknownKey(name: string, known: readonly string[]): string {
  const near = known.find((key) => key.toLowerCase() === name.toLowerCase());
  return `is not a key of this format${near ? ` (did you mean "${near}"?)` : ''}`;
}

function describe(value: unknown): string {
  if (value === undefined) return 'nothing';
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'string') return `"${value.length > 40 ? `${value.slice(0, 40)}…` : value}"`;
  return typeof value === 'object' ? 'an object' : String(value);
}
