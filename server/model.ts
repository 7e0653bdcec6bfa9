import { heatRangePerWeek, type HeatRange } from '../models/planning/heat-range';
import { readScenario } from '../models/scenario/read-scenario';
import type { Scenario } from '../models/scenario/types';

/** The server's door to the model: what it asks at once, and the thread that computes in earnest. */
export interface Model {
  readScenario(json: unknown): Scenario;
  heatRangePerWeek(scenario: Scenario): HeatRange;
  workerEntry: URL;
}

export const realModel: Model = {
  readScenario,
  heatRangePerWeek,
  workerEntry: new URL('./jobs/worker-entry.mjs', import.meta.url),
};
