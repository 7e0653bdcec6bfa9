import type { LimitName } from '../../../models/planning/plan-limits';
import { JOULE_PER, M3_PER_S_PER, PASCAL_PER } from '../../../models/units';
import type { BindingLimit } from '../../../models/scenario/types';

interface Wording {
  /** What giving way by one step would be, where and when. */
  giveWay: (well: string, when: string) => string;
  /** One step of people, in SI: the price is told for that much. */
  step: number;
}

const LITRE = { step: M3_PER_S_PER['l/s'] };
const BAR = { step: PASCAL_PER.bar };
const HEAT = { step: 100 * JOULE_PER.MWh };

const WORDINGS: Record<LimitName, Wording> = {
  heatTarget: { ...HEAT, giveWay: (_well, when) => `100 MWh less heat${when}` },
  heatCeiling: { ...HEAT, giveWay: (_well, when) => `100 MWh more room above the heat target${when}` },
  massBalance: {
    ...LITRE,
    giveWay: (_well, when) => `1 l/s of difference between production and injection${when}`,
  },
  ramp: {
    ...LITRE,
    giveWay: (well, when) => `A change of ${well} by 1 l/s more than its weekly limit${when}`,
  },
  maxRate: { ...LITRE, giveWay: (well, when) => `A maximum of ${well} that is 1 l/s higher${when}` },
  minRate: { ...LITRE, giveWay: (well, when) => `A minimum of ${well} that is 1 l/s lower${when}` },
  outage: { ...LITRE, giveWay: (well, when) => `Each 1 l/s through ${well} during its outage${when}` },
  maxPressure: { ...BAR, giveWay: (well, when) => `A pressure limit of ${well} that is 1 bar higher${when}` },
  cap: { step: 1, giveWay: (_well, when) => `A cap that is one expected event higher${when}` },
  minPressure: { ...BAR, giveWay: (well, when) => `A pressure limit of ${well} that is 1 bar lower${when}` },
};

/** What giving way a little would be worth: "100 MWh less heat in week 2 would save 0.65 expected events." */
export function bindingSentence({ limit, well, week, price }: BindingLimit): string {
  const wording = WORDINGS[limit as LimitName];
  const when = week === undefined ? '' : ` in week ${week}`;
  const events = price * wording.step;
  return `${wording.giveWay(well ?? '', when)} would ${events < 0 ? 'save' : 'add'} ${significant(Math.abs(events))} expected events.`;
}

/** Two significant figures without an exponent. */
function significant(value: number): string {
  if (value === 0) return '0';
  const decimals = Math.max(0, 1 - Math.floor(Math.log10(value)));
  return value.toFixed(Math.min(decimals, 8));
}
