import type { Scenario } from '../models/scenario/types';

/** The server's door to the model: what it asks at once, and the thread that computes in earnest. */
export interface Model {
  readScenario(json: unknown): Scenario;
  heatRangePerWeek(scenario: Scenario): { leastHeatJ: number[]; mostHeatJ: number[] };
  workerEntry: URL;
}

const notYet = () => {
  throw new Error('the model is not part of this build yet');
};

export const realModel: Model = {
  readScenario: notYet,
  heatRangePerWeek: notYet,
  workerEntry: new URL('./jobs/worker-entry.mjs', import.meta.url),
};
