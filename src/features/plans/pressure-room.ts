import type { PlanResult } from '../../contract/plans';
import { bar, inWords } from '../../lib/format';

type Well = PlanResult['wells'][number];

/** Below this, as a fraction of the limit, the pressure is at the limit. */
const AT_LIMIT = 5e-4;

/** How close a well's pressure comes to its limits over the whole horizon. */
export function roomSentence(result: PlanResult, well: Well): string {
  const states = result.weeks.flatMap((week) => week.wells.filter((entry) => entry.name === well.name));
  const parts = [
    well.maxPressurePa === null
      ? null
      : room(
          well.maxPressurePa,
          well.maxPressurePa - Math.max(...states.map((state) => state.bottomHoleMaxPa)),
          'highest',
        ),
    well.minPressurePa === null
      ? null
      : room(
          well.minPressurePa,
          Math.min(...states.map((state) => state.bottomHoleMinPa)) - well.minPressurePa,
          'lowest',
        ),
  ].filter((part) => part !== null);
  if (parts.length === 0) return `${well.name} has no limit on its bottom-hole pressure.`;
  return `${well.name} ${parts.join(' and ')}.`;
}

function room(limitPa: number, roomPa: number, which: 'highest' | 'lowest'): string {
  const limit = `the ${which} pressure allowed, ${inWords(bar(limitPa))}`;
  if (roomPa < -AT_LIMIT * limitPa) return `passes ${limit}, by ${inWords(bar(-roomPa))}`;
  if (roomPa < AT_LIMIT * limitPa) return `reaches ${limit}`;
  return `stays ${inWords(bar(roomPa))} from ${limit}`;
}
