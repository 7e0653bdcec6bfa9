import { createHash } from 'node:crypto';

/** JSON with its keys in order, so that the same content always gives the same text. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) =>
    part !== null && typeof part === 'object' && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
}

/** What a result depends on, in one word: equal hashes and model versions mean equal results. */
export function inputHash(scenario: unknown): string {
  return createHash('sha256').update(canonicalJson(scenario)).digest('hex');
}
