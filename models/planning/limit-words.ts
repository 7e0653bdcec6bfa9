/** Limits in words and units of people. */
import { JOULE_PER, M3_PER_S_PER, PASCAL_PER } from '../units';
import type { PlanLimit } from './plan-limits';

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
