/** Limits in words and units of people. */
import { JOULE_PER, M3_PER_S_PER, PASCAL_PER } from '../units';
import type { PlanLimit } from './plan-limits';

const inScope = (scope?: string) =>
  scope === undefined || scope === 'field' ? 'in the field' : `in ${scope}`;
const litres = (m3PerS: number) => `${round(m3PerS / M3_PER_S_PER['l/s'])} l/s`;
const megawattHours = (joule: number) => `${round(joule / JOULE_PER.MWh)} MWh`;
const bars = (pascal: number) => `${round(pascal / PASCAL_PER.bar)} bar`;

function round(value: number): string {
  if (value === 0) return '0';
  const digits = Math.max(0, 2 - Math.floor(Math.log10(Math.abs(value))));
  return value.toFixed(Math.min(digits, 6));
}

/** How far a limit would have to give way, as a sentence; `amount` in the limit's SI unit. */
export function collisionSentence(limit: PlanLimit, amount: number): string {
  const when = `in week ${limit.week}`;
  const moves = amount > 0;
  switch (limit.name) {
    case 'heatTarget':
      return moves
        ? `The heat target ${when} is out of reach: it would have to be ${megawattHours(amount)} lower.`
        : `The heat target ${when} takes part in the collision.`;
    case 'heatCeiling':
      return moves
        ? `The heat ceiling ${when} is too low: it would have to be ${megawattHours(amount)} higher.`
        : `The heat ceiling ${when} takes part in the collision.`;
    case 'massBalance':
      return moves
        ? `Injection and production cannot be balanced ${when}: ${litres(amount)} are left over.`
        : `The balance of injection and production ${when} takes part in the collision.`;
    case 'ramp':
      return moves
        ? `${limit.well} would have to change by ${litres(amount)} more than its weekly limit ${when}.`
        : `The weekly change of ${limit.well} ${when} takes part in the collision.`;
    case 'maxRate':
      return moves
        ? `${limit.well} would have to run ${litres(amount)} above its maximum ${when}.`
        : `The maximum rate of ${limit.well} ${when} takes part in the collision.`;
    case 'minRate':
      return moves
        ? `${limit.well} would have to run ${litres(amount)} below its minimum ${when}.`
        : `The minimum rate of ${limit.well} ${when} takes part in the collision.`;
    case 'outage':
      return moves
        ? `${limit.well} is out ${when} but would have to run at ${litres(amount)}.`
        : `The outage of ${limit.well} ${when} takes part in the collision.`;
    case 'cap':
      return moves
        ? `The cap on events ${inScope(limit.scope)} to the end of week ${limit.week} cannot be kept: at least ${round(amount)} more are expected.`
        : `The cap on events ${inScope(limit.scope)} to the end of week ${limit.week} takes part in the collision.`;
    case 'maxPressure':
      return moves
        ? `The bottom-hole pressure of ${limit.well} would pass its maximum by ${bars(amount)} ${when}.`
        : `The maximum bottom-hole pressure of ${limit.well} ${when} takes part in the collision.`;
    case 'minPressure':
      return moves
        ? `The bottom-hole pressure of ${limit.well} would fall ${bars(amount)} below its minimum ${when}.`
        : `The minimum bottom-hole pressure of ${limit.well} ${when} takes part in the collision.`;
  }
}

/** What a set of rates breaks, as a sentence; `amount` is the worst of the weeks, in the limit's SI unit. */
export function breakSentence(
  { name, well, scope }: PlanLimit,
  amount: number,
  weeks: readonly number[],
): string {
  const when = inWeeks(weeks);
  switch (name) {
    case 'heatTarget':
      return `The heat falls up to ${megawattHours(amount)} a week short of its target ${when}.`;
    case 'heatCeiling':
      return `The heat passes its ceiling by up to ${megawattHours(amount)} a week ${when}.`;
    case 'massBalance':
      return `Injection and production differ by up to ${litres(amount)} ${when}.`;
    case 'ramp':
      return `${well} changes by up to ${litres(amount)} more than its weekly limit ${when}.`;
    case 'maxRate':
      return `${well} runs up to ${litres(amount)} above its maximum ${when}.`;
    case 'minRate':
      return `${well} runs up to ${litres(amount)} below its minimum ${when}.`;
    case 'outage':
      return `${well} runs at up to ${litres(amount)} although it is out ${when}.`;
    case 'cap':
      return `The expected events ${inScope(scope)} pass their cap by up to ${round(amount)}, counted from the start, ${when}.`;
    case 'maxPressure':
      return `The bottom-hole pressure of ${well} passes its maximum by up to ${bars(amount)} ${when}.`;
    case 'minPressure':
      return `The bottom-hole pressure of ${well} falls up to ${bars(amount)} below its minimum ${when}.`;
  }
}

/** "in week 3", "in weeks 1–4 and 7". */
export function inWeeks(weeks: readonly number[]): string {
  const sorted = [...new Set(weeks)].sort((a, b) => a - b);
  const runs: [number, number][] = [];
  for (const week of sorted) {
    const last = runs.at(-1);
    if (last && week === last[1] + 1) last[1] = week;
    else runs.push([week, week]);
  }
  const words = runs.map(([from, to]) => (from === to ? `${from}` : `${from}–${to}`));
  const tail = words.pop() ?? '';
  return `in week${sorted.length === 1 ? '' : 's'} ${words.length > 0 ? `${words.join(', ')} and ${tail}` : tail}`;
}
