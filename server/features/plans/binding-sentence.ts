import { JOULE_PER, M3_PER_S_PER, PASCAL_PER } from '../../../models/units';
import type { BindingLimit } from '../../../models/scenario/types';

/** A price per SI unit, said per step that people think in. */
const PEOPLE_UNITS: Record<string, { factor: number; step: string }> = {
  'events per m3/s': { factor: M3_PER_S_PER['l/s'], step: '1 l/s' },
  'events per Pa': { factor: PASCAL_PER.bar, step: '1 bar' },
  'events per J': { factor: 100 * JOULE_PER.MWh, step: '100 MWh' },
};

/** What one unit of give in a limit is worth, as a sentence: "1 l/s more at HF-4 in week 3 would save 0.02 events." */
export function bindingSentence({ limit, well, week, price, unit }: BindingLimit): string {
  const people = PEOPLE_UNITS[unit];
  const where = [well ? `at ${well}` : '', week === undefined ? '' : `in week ${week}`]
    .filter(Boolean)
    .join(' ');
  const change = people ? price * people.factor : price;
  const step = people?.step ?? `one unit (${unit})`;
  const effect = `${change < 0 ? 'save' : 'add'} ${significant(Math.abs(change))} expected events`;
  return `${step} of give in the ${limit}${where ? ` ${where}` : ''} would ${effect}.`;
}

/** Two significant figures without an exponent. */
function significant(value: number): string {
  if (value === 0) return '0';
  const decimals = Math.max(0, 1 - Math.floor(Math.log10(value)));
  return value.toFixed(Math.min(decimals, 8));
}
