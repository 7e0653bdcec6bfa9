/**
 * The only way into the model: untrusted JSON becomes a checked scenario, or a list of everything wrong with it.
 *
 * Limits    throws ScenarioError with one issue per offending value (JSON path and why)
 */
import { ScenarioError } from '../errors';
import { isInsidePolygon, polygonArea } from '../grid/polygon';
import {
  flag,
  list,
  number,
  object,
  oneOf,
  optional,
  orNull,
  required,
  text,
  type Issues,
  type Reader,
} from './input-reader';
import type {
  BarrierSpec,
  CapSpec,
  HistorySpec,
  ObserverSpec,
  OutageSpec,
  PlanSpec,
  PointM,
  RatesSpec,
  RegionSpec,
  ReservoirSpec,
  Scenario,
  SeismicitySpec,
  WellSpec,
  ZoneSpec,
} from './types';

/** Sizes beyond these would run for hours or out of memory; a refusal is kinder. */
const MOST_CELLS = 250_000;
const MOST_WELLS = 200;
const MOST_WEEKS = 520;
const MOST_PLAN_WEEKS = 52;
const MOST_STEPS = 20_000;

const coordinate = number({ min: -1e7, max: 1e7, unit: 'm' });
const factor = number({ above: 0, max: 1e6 });
const rate = number({ min: 0, max: 100, unit: 'm³/s' });
const pressure = number({ min: -1e10, max: 1e10, unit: 'Pa' });
const week = number({ min: 1, max: MOST_WEEKS, whole: true });

const point: Reader<PointM> = (value, path, issues) => {
  const [x, y] = list(coordinate, { least: 2, most: 2 })(value, path, issues);
  return [x ?? NaN, y ?? NaN];
};

const polygon: Reader<PointM[]> = (value, path, issues) => {
  const before = issues.length;
  const points = list(point, { least: 3, most: 10_000 })(value, path, issues);
  if (issues.length > before) return [];
  if (polygonArea(points) > 0) return points;
  issues.push({ path, message: 'must enclose an area: its points lie on one line' });
  return [];
};

const sideKind = required(oneOf('noFlow', 'fixedPressure'));

const reservoir = object<ReservoirSpec>({
  widthM: required(number({ above: 0, max: 1e6, unit: 'm' })),
  heightM: required(number({ above: 0, max: 1e6, unit: 'm' })),
  cellsX: required(number({ min: 3, max: MOST_CELLS, whole: true })),
  cellsY: required(number({ min: 3, max: MOST_CELLS, whole: true })),
  thicknessM: required(number({ above: 0, max: 1e5, unit: 'm' })),
  permeabilityM2: required(number({ above: 0, max: 1e-6, unit: 'm²' })),
  storagePerPa: required(number({ above: 0, max: 1e-3, unit: '1/Pa' })),
  viscosityPaS: required(number({ above: 0, max: 1, unit: 'Pa·s' })),
  initialPressurePa: required(pressure),
  densityKgPerM3: required(number({ above: 0, max: 5000, unit: 'kg/m³' })),
  boundary: required(
    object<ReservoirSpec['boundary']>({ west: sideKind, east: sideKind, south: sideKind, north: sideKind }),
  ),
  regions: optional(
    list(
      object<RegionSpec>({
        name: required(text()),
        polygonM: required(polygon),
        permeabilityFactor: optional(factor, 1),
        storageFactor: optional(factor, 1),
      }),
      { most: 1000 },
    ),
    [],
  ),
  barriers: optional(
    list(
      object<BarrierSpec>({
        name: required(text()),
        lineM: required(list(point, { least: 2, most: 10_000 })),
        transmissibilityFactor: required(number({ min: 0, max: 1e6 })),
      }),
      { most: 1000 },
    ),
    [],
  ),
});

const seismicity = object<SeismicitySpec>({
  friction: required(number({ above: 0, max: 2 })),
  aSigmaPa: required(number({ above: 0, max: 1e9, unit: 'Pa' })),
  stressingRatePaPerYear: required(number({ above: 0, max: 1e9, unit: 'Pa per year' })),
  backgroundEventsPerYear: required(number({ above: 0, max: 1e9 })),
  completenessMagnitude: required(number({ min: -10, max: 10 })),
  bValue: required(number({ above: 0, max: 10 })),
  zones: optional(
    list(
      object<ZoneSpec>({
        name: required(text()),
        polygonM: required(polygon),
        weight: required(number({ min: 0, max: 1e9 })),
      }),
      { most: 200 },
    ),
    [],
  ),
  elsewhereWeight: optional(number({ min: 0, max: 1e9 }), 1),
});

type WellKeys = WellSpec & { offOrAboveMin: boolean };

const well = object<WellKeys>({
  name: required(text()),
  kind: required(oneOf('producer', 'injector')),
  xM: required(coordinate),
  yM: required(coordinate),
  radiusM: required(number({ above: 0, max: 10, unit: 'm' })),
  skin: optional(number({ min: -20, max: 1000 }), 0),
  control: optional(flag, false),
  minRateM3PerS: optional(rate, 0),
  maxRateM3PerS: optional(orNull(rate), null),
  maxChangeM3PerSPerWeek: optional(orNull(rate), null),
  minPressurePa: optional(orNull(pressure), null),
  maxPressurePa: optional(orNull(pressure), null),
  heatJPerM3: optional(number({ min: 0, max: 1e11, unit: 'J/m³' }), 0),
  outages: optional(
    list(object<OutageSpec>({ fromWeek: required(week), toWeek: required(week) }), { most: 1000 }),
    [],
  ),
  offOrAboveMin: optional(notYet(false), false),
});

const history = list(
  object<HistorySpec>({
    well: required(text()),
    steps: required(
      list(
        object<HistorySpec['steps'][number]>({
          fromS: required(number({ min: -1e10, max: 0, unit: 's (the plan starts at 0)' })),
          rateM3PerS: required(rate),
        }),
        { most: MOST_STEPS },
      ),
    ),
  }),
);

const rates = list(
  object<RatesSpec>({
    well: required(text()),
    weeklyM3PerS: required(list(rate, { least: 1, most: MOST_WEEKS })),
  }),
);

const cap = object<CapSpec>({
  scope: required(text()),
  kind: required(cumulativeOnly),
  rateMultiple: required(number({ above: 0, max: 1e6 })),
});

const weeklyHeat = list(number({ min: 0, max: 1e18, unit: 'J' }), { most: MOST_PLAN_WEEKS });

type PlanKeys = PlanSpec & Record<'maxChangesPerWeek' | 'locks' | 'groups' | 'ensemble' | 'risk', unknown>;

const plan = object<PlanKeys>({
  weeks: required(number({ min: 1, max: MOST_PLAN_WEEKS, whole: true })),
  lookAheadWeeks: optional(number({ min: 0, max: 260, whole: true }), 26),
  objective: optional(objective, 'quietest'),
  heatTargetJPerWeek: optional(weeklyHeat, []),
  heatCeilingJPerWeek: optional(weeklyHeat, []),
  lossFraction: optional(number({ min: 0, below: 1 }), 0),
  caps: optional(list(cap, { most: 100 }), []),
  setPointStepM3PerS: optional(orNull(number({ above: 0, max: 1, unit: 'm³/s' })), null),
  polishTolerance: optional(number({ min: 0, max: 0.5 }), 0),
  maxChangesPerWeek: optional(notYet(null), null),
  locks: optional(emptyOnly(), []),
  groups: optional(emptyOnly(), []),
  ensemble: optional(emptyOnly(), []),
  risk: optional(notYet(null), null),
});

const file = object<Omit<Scenario, 'plan' | 'wells'> & { plan: PlanKeys | null; wells: WellKeys[] }>({
  format: required(oneOf('stillfield-scenario/1')),
  reservoir: required(reservoir),
  seismicity: required(seismicity),
  wells: required(list(well, { least: 1, most: MOST_WELLS })),
  history: optional(history, []),
  rates: optional(rates, []),
  plan: optional(orNull(plan), null),
  observers: optional(
    list(
      object<ObserverSpec>({ name: required(text()), xM: required(coordinate), yM: required(coordinate) }),
      { most: 1000 },
    ),
    [],
  ),
});

/** @throws ScenarioError */
export function readScenario(json: unknown): Scenario {
  const issues: Issues = [];
  const read = file(json, '$', issues);
  const scenario: Scenario = {
    ...read,
    wells: read.wells.map(({ offOrAboveMin: _offOrAboveMin, ...spec }): WellSpec => spec),
    plan: read.plan && planOnly(read.plan),
  };
  checkReservoir(scenario.reservoir, issues);
  checkZones(scenario, issues);
  checkWells(scenario, issues);
  checkWellLists(scenario, issues);
  if (scenario.plan) checkPlan(scenario.plan, scenario.seismicity, issues);
  if (issues.length > 0) throw new ScenarioError(issues);
  return scenario;
}

function planOnly(read: PlanKeys): PlanSpec {
  const {
    maxChangesPerWeek: _changes,
    locks: _locks,
    groups: _groups,
    ensemble: _ensemble,
    risk: _risk,
    ...spec
  } = read;
  return spec;
}

/** A key of the format whose effect this version does not have: refused, never ignored. */
function notYet<T>(only: T): Reader<T> {
  return (value, path, issues) => {
    if (value !== only) issues.push({ path, message: 'is not supported by this version of the planner' });
    return only;
  };
}

function emptyOnly<T>(): Reader<T[]> {
  return (value, path, issues) => {
    const isEmpty = Array.isArray(value) && value.length === 0;
    if (!isEmpty)
      issues.push({
        path,
        message: 'is not supported by this version of the planner: leave it out or empty',
      });
    return [];
  };
}

function objective(value: unknown, path: string, issues: Issues): PlanSpec['objective'] {
  const wanted = oneOf<PlanSpec['objective']>('quietest', 'mostHeat', 'leastPumping')(value, path, issues);
  if (wanted === 'leastPumping')
    issues.push({ path, message: 'is not supported by this version of the planner' });
  return wanted;
}

function cumulativeOnly(value: unknown, path: string, issues: Issues): CapSpec['kind'] {
  const kind = oneOf<CapSpec['kind']>('cumulative', 'weekly')(value, path, issues);
  if (kind === 'weekly') issues.push({ path, message: 'is not supported by this version of the planner' });
  return kind;
}

function checkReservoir({ widthM, heightM, cellsX, cellsY, regions }: ReservoirSpec, issues: Issues): void {
  if (cellsX * cellsY > MOST_CELLS) {
    issues.push({
      path: '$.reservoir.cellsX',
      message: `${cellsX} × ${cellsY} = ${cellsX * cellsY} cells are more than the ${MOST_CELLS} that can be computed`,
    });
    return;
  }
  regions.forEach((region, index) => {
    if (holdsNoCell({ widthM, heightM, cellsX, cellsY }, region.polygonM)) {
      issues.push({
        path: `$.reservoir.regions[${index}].polygonM`,
        message: 'holds no cell centre, so it would have no effect',
      });
    }
  });
}

function checkZones(
  { reservoir: spec, seismicity: { zones, elsewhereWeight } }: Scenario,
  issues: Issues,
): void {
  noTwice(
    zones.map((zone) => zone.name),
    (index) => `$.seismicity.zones[${index}].name`,
    'a zone',
    issues,
  );
  zones.forEach((zone, index) => {
    const path = `$.seismicity.zones[${index}]`;
    if (zone.name === 'field')
      issues.push({
        path: `${path}.name`,
        message: '"field" stands for the whole field: choose another name',
      });
    if (holdsNoCell(spec, zone.polygonM)) {
      issues.push({ path: `${path}.polygonM`, message: 'holds no cell centre, so it would have no events' });
    }
  });
  if (elsewhereWeight === 0 && zones.every((zone) => zone.weight === 0)) {
    issues.push({
      path: '$.seismicity.elsewhereWeight',
      message: 'all weights are 0, so the background rate would lie nowhere',
    });
  }
}

type GridSize = Pick<ReservoirSpec, 'widthM' | 'heightM' | 'cellsX' | 'cellsY'>;

/** False as well where the polygon or the grid could not be read: that has been reported. */
function holdsNoCell({ widthM, heightM, cellsX, cellsY }: GridSize, polygonM: PointM[]): boolean {
  if (polygonM.length === 0 || !(cellsX * cellsY <= MOST_CELLS) || !(widthM * heightM > 0)) return false;
  for (let iy = 0; iy < cellsY; iy++) {
    for (let ix = 0; ix < cellsX; ix++) {
      if (isInsidePolygon(((ix + 0.5) * widthM) / cellsX, ((iy + 0.5) * heightM) / cellsY, polygonM))
        return false;
    }
  }
  return true;
}

function checkWells({ wells, observers, reservoir: spec }: Scenario, issues: Issues): void {
  noTwice(
    wells.map((entry) => entry.name),
    (index) => `$.wells[${index}].name`,
    'a well',
    issues,
  );
  noTwice(
    observers.map((entry) => entry.name),
    (index) => `$.observers[${index}].name`,
    'an observer',
    issues,
  );
  wells.forEach((entry, index) => {
    const path = `$.wells[${index}]`;
    checkPlace(entry, spec, path, issues);
    if (entry.maxRateM3PerS !== null && entry.maxRateM3PerS < entry.minRateM3PerS) {
      issues.push({
        path: `${path}.maxRateM3PerS`,
        message: `is below minRateM3PerS (${entry.minRateM3PerS})`,
      });
    }
    if (
      entry.maxPressurePa !== null &&
      entry.minPressurePa !== null &&
      entry.maxPressurePa < entry.minPressurePa
    ) {
      issues.push({
        path: `${path}.maxPressurePa`,
        message: `is below minPressurePa (${entry.minPressurePa})`,
      });
    }
    entry.outages.forEach((outage, at) => {
      if (outage.toWeek < outage.fromWeek) {
        issues.push({
          path: `${path}.outages[${at}].toWeek`,
          message: `is before fromWeek (${outage.fromWeek})`,
        });
      }
    });
  });
  observers.forEach((entry, index) => checkPlace(entry, spec, `$.observers[${index}]`, issues));
}

function checkPlace(
  place: { xM: number; yM: number },
  { widthM, heightM }: ReservoirSpec,
  path: string,
  issues: Issues,
): void {
  const outside = (key: 'xM' | 'yM', most: number) => {
    if (place[key] < 0 || place[key] > most) {
      issues.push({
        path: `${path}.${key}`,
        message: `lies outside the reservoir (0 to ${most} m), not ${place[key]}`,
      });
    }
  };
  outside('xM', widthM);
  outside('yM', heightM);
}

function checkWellLists({ wells, history: past, rates: future, plan: spec }: Scenario, issues: Issues): void {
  const names = new Set(wells.map((entry) => entry.name));
  const isKnown = (name: string, path: string) => {
    if (name !== '' && !names.has(name)) issues.push({ path, message: `"${name}" is not one of the wells` });
  };
  noTwice(
    past.map((entry) => entry.well),
    (index) => `$.history[${index}].well`,
    'the history of a well',
    issues,
  );
  noTwice(
    future.map((entry) => entry.well),
    (index) => `$.rates[${index}].well`,
    'the rates of a well',
    issues,
  );
  past.forEach((entry, index) => {
    isKnown(entry.well, `$.history[${index}].well`);
    entry.steps.forEach((step, at) => {
      const before = at > 0 ? entry.steps[at - 1].fromS : -Infinity;
      if (step.fromS <= before) {
        issues.push({
          path: `$.history[${index}].steps[${at}].fromS`,
          message: `must come after the step before it (${before})`,
        });
      }
    });
  });
  const longest = future.reduce((most, entry) => Math.max(most, entry.weeklyM3PerS.length), 1);
  const allowed = spec ? [1, spec.weeks, spec.weeks + spec.lookAheadWeeks] : [1, longest];
  future.forEach((entry, index) => {
    isKnown(entry.well, `$.rates[${index}].well`);
    const { length } = entry.weeklyM3PerS;
    if (length > 0 && allowed.every((count) => count !== length && !Number.isNaN(count))) {
      const choices = [...new Set(allowed)].join(' or ');
      issues.push({
        path: `$.rates[${index}].weeklyM3PerS`,
        message: `must have ${choices} entries, not ${length}`,
      });
    }
  });
}

function checkPlan(
  { weeks, heatTargetJPerWeek: targets, heatCeilingJPerWeek: ceilings, caps }: PlanSpec,
  { zones }: SeismicitySpec,
  issues: Issues,
): void {
  caps.forEach(({ scope }, index) => {
    if (scope === '' || scope === 'field' || zones.some((zone) => zone.name === scope && zone.weight > 0))
      return;
    const message = `"${scope}" is neither "field" nor a zone with a background rate`;
    issues.push({ path: `$.plan.caps[${index}].scope`, message });
  });
  const count = (values: number[], path: string) => {
    if (values.length > 1 && values.length !== weeks && !Number.isNaN(weeks)) {
      issues.push({ path, message: `must have 1 or ${weeks} entries, not ${values.length}` });
    }
  };
  count(targets, '$.plan.heatTargetJPerWeek');
  count(ceilings, '$.plan.heatCeilingJPerWeek');
  ceilings.forEach((ceiling, index) => {
    const target =
      targets.length === 1 ? targets[0] : ceilings.length === 1 ? Math.max(...targets) : targets[index];
    if (target > ceiling) {
      issues.push({
        path: `$.plan.heatCeilingJPerWeek[${index}]`,
        message: `is below the heat target (${target})`,
      });
    }
  });
}

function noTwice(names: string[], path: (index: number) => string, what: string, issues: Issues): void {
  const seen = new Set<string>();
  names.forEach((name, index) => {
    if (name !== '' && seen.has(name))
      issues.push({
        path: path(index),
        message: `"${name}" is given twice: ${what} needs a name of its own`,
      });
    seen.add(name);
  });
}
