/**
 * The scenario file, `stillfield-scenario/1`: everything that a forecast or a plan depends on.
 *
 * Names, units and meaning are part of the product (README, `npm run scenario -- --help`); `read-scenario.ts`
 * is the only way in, so a value of these types has been checked. Rates are magnitudes, their direction is
 * the well's kind. SI throughout.
 */
export type PointM = readonly [number, number];
export type BoundaryKind = 'noFlow' | 'fixedPressure';
export type Side = 'west' | 'east' | 'south' | 'north';

export interface RegionSpec {
  name: string;
  polygonM: PointM[];
  permeabilityFactor: number;
  storageFactor: number;
}

export interface BarrierSpec {
  name: string;
  lineM: PointM[];
  transmissibilityFactor: number;
}

export interface ReservoirSpec {
  widthM: number;
  heightM: number;
  cellsX: number;
  cellsY: number;
  thicknessM: number;
  permeabilityM2: number;
  /** φ·c_t */
  storagePerPa: number;
  viscosityPaS: number;
  initialPressurePa: number;
  densityKgPerM3: number;
  boundary: Record<Side, BoundaryKind>;
  regions: RegionSpec[];
  barriers: BarrierSpec[];
}

export interface ZoneSpec {
  name: string;
  polygonM: PointM[];
  weight: number;
}

export interface SeismicitySpec {
  friction: number;
  aSigmaPa: number;
  stressingRatePaPerYear: number;
  backgroundEventsPerYear: number;
  completenessMagnitude: number;
  bValue: number;
  zones: ZoneSpec[];
  elsewhereWeight: number;
}

/** Weeks count from 1; both ends belong to the outage. */
export interface OutageSpec {
  fromWeek: number;
  toWeek: number;
}

export interface WellSpec {
  name: string;
  kind: 'producer' | 'injector';
  xM: number;
  yM: number;
  radiusM: number;
  skin: number;
  /** Whether a plan may move it. */
  control: boolean;
  minRateM3PerS: number;
  /** null: no maximum of its own. */
  maxRateM3PerS: number | null;
  maxChangeM3PerSPerWeek: number | null;
  minPressurePa: number | null;
  maxPressurePa: number | null;
  /** Heat delivered per cubic metre produced; 0 for an injector. */
  heatJPerM3: number;
  outages: OutageSpec[];
}

export interface HistorySpec {
  well: string;
  /** Seconds before the plan's start are negative; each rate holds until the next step. */
  steps: { fromS: number; rateM3PerS: number }[];
}

export interface RatesSpec {
  well: string;
  weeklyM3PerS: number[];
}

export interface CapSpec {
  /** 'field' or a zone's name. */
  scope: string;
  kind: 'cumulative' | 'weekly';
  rateMultiple: number;
}

export interface PlanSpec {
  weeks: number;
  lookAheadWeeks: number;
  objective: 'quietest' | 'mostHeat' | 'leastPumping';
  /** One entry, or one per week; empty: no floor. */
  heatTargetJPerWeek: number[];
  /** One entry, or one per week; empty: no ceiling. */
  heatCeilingJPerWeek: number[];
  lossFraction: number;
  caps: CapSpec[];
  setPointStepM3PerS: number | null;
  polishTolerance: number;
}

export interface ObserverSpec {
  name: string;
  xM: number;
  yM: number;
}

export interface Scenario {
  format: 'stillfield-scenario/1';
  reservoir: ReservoirSpec;
  seismicity: SeismicitySpec;
  wells: WellSpec[];
  history: HistorySpec[];
  rates: RatesSpec[];
  /** null: nothing is planned, the rates given are forecast. */
  plan: PlanSpec | null;
  observers: ObserverSpec[];
}

export interface ZoneWeek {
  name: string;
  expectedEvents: number;
  /** Null where the zone has no background to compare with. */
  rateMultiple: number | null;
}

export interface WellWeek {
  name: string;
  bottomHoleEndPa: number;
  bottomHoleMinPa: number;
  bottomHoleMaxPa: number;
}

export interface WeekForecast {
  week: number;
  expectedEvents: number;
  rateMultiple: number;
  zones: ZoneWeek[];
  wells: WellWeek[];
  observers: { name: string; overpressurePa: number }[];
  heatJ: number;
}

export interface Totals {
  expectedEvents: number;
  backgroundEvents: number;
  rateMultiple: number;
  heatJ: number;
}

/** What a library and its quadrature cost and how good they are. */
export interface Diagnostics {
  cells: number;
  responseModes: number;
  /** Estimated relative error of the unit responses from day 1 to the end. */
  responseErrorEstimate: number;
  warnings: string[];
}

export interface ForecastResult {
  weeks: WeekForecast[];
  totals: Totals;
  modelVersion: string;
  diagnostics: Diagnostics;
}

export interface BindingLimit {
  limit: string;
  well?: string;
  /** Of a cap on events: the field or a zone's name. */
  scope?: string;
  week?: number;
  /** Change of the objective per unit of relaxation of the limit. */
  price: number;
  unit: string;
}

export interface Alternative {
  expectedEvents: number;
  rateMultiple: number;
  heatJ: number;
  weeklyRateMultiple: number[];
  weeklyHeatJ: number[];
  /** Whether every week delivers its heat target. */
  meetsTargets: boolean;
  /** The limits it breaks, one sentence each. */
  breaks: string[];
  rates: RatesSpec[];
}

export interface PlanResult extends ForecastResult {
  /** Every well, the plan's weeks (the last is held through the look-ahead). */
  rates: RatesSpec[];
  expectedEvents: number;
  /** Quietest: no plan within the limits expects fewer. Null for another objective. */
  lowerBound: number | null;
  /** Most heat: what the plan's weeks deliver, and what no plan within the limits passes. */
  heatJ?: number;
  heatUpperBoundJ?: number;
  /** Relative distance between the plan and its bound. */
  gap: number;
  binding: BindingLimit[];
  comparison: { hold: Alternative; evenSplit: Alternative | null };
  check: { expectedEvents: number; relativeDifference: number };
  rounds: number;
  seconds: number;
}
