import { describe, expect, it } from 'vitest';

import { ScenarioError } from '../../../models/errors';
import { readScenario } from '../../../models/scenario/read-scenario';
import { smallScenario } from '../../support/small-scenario';

/** The file with changes made to it by path, as untyped JSON. */
function changed(change: (json: any) => void): unknown {
  const json = JSON.parse(JSON.stringify(smallScenario()));
  change(json);
  return json;
}

function issuesOf(json: unknown): { path: string; message: string }[] {
  try {
    readScenario(json);
  } catch (error) {
    if (error instanceof ScenarioError) return error.issues;
    throw error;
  }
  return [];
}

describe('a scenario file that can be used', () => {
  it('is read as it is', () => {
    expect(readScenario(changed(() => {}))).toEqual(smallScenario());
  });

  it('may leave out what has a natural absence', () => {
    const read = readScenario(
      changed((json) => {
        for (const key of ['history', 'rates', 'observers']) delete json[key];
        for (const key of ['regions', 'barriers']) delete json.reservoir[key];
        for (const key of ['outages', 'skin', 'maxPressurePa', 'heatJPerM3']) delete json.wells[2][key];
        for (const key of ['lookAheadWeeks', 'caps', 'setPointStepM3PerS', 'polishTolerance'])
          delete json.plan[key];
      }),
    );
    expect(read.history).toEqual([]);
    expect(read.wells[2]).toMatchObject({ outages: [], skin: 0, maxPressurePa: null, heatJPerM3: 0 });
    expect(read.plan).toMatchObject({
      lookAheadWeeks: 26,
      caps: [],
      setPointStepM3PerS: null,
      polishTolerance: 0,
    });
  });

  it('may carry a later key where it asks for nothing', () => {
    expect(
      issuesOf(changed((json) => Object.assign(json.plan, { caps: [], locks: [], groups: [] }))),
    ).toEqual([]);
    expect(issuesOf(changed((json) => (json.wells[0].offOrAboveMin = false)))).toEqual([]);
  });
});

describe('a scenario file that cannot be used', () => {
  const cases: [string, (json: any) => void, string, RegExp][] = [
    ['an unknown format', (j) => (j.format = 'other/1'), '$.format', /stillfield-scenario\/1/],
    ['a missing key', (j) => delete j.reservoir.thicknessM, '$.reservoir.thicknessM', /missing/],
    ['an unknown key', (j) => (j.plan.weekz = 3), '$.plan.weekz', /not a key/],
    ['a key in the wrong case', (j) => (j.wells[0].xm = 3), '$.wells[0].xm', /did you mean "xM"/],
    ['a negative thickness', (j) => (j.reservoir.thicknessM = -1), '$.reservoir.thicknessM', /above 0/],
    ['no number', (j) => (j.reservoir.permeabilityM2 = NaN), '$.reservoir.permeabilityM2', /finite/],
    ['a number written as text', (j) => (j.wells[1].xM = '5'), '$.wells[1].xM', /must be a number.*"5"/],
    ['no friction', (j) => (j.seismicity.friction = 0), '$.seismicity.friction', /above 0/],
    [
      '10⁷ cells',
      (j) => (j.reservoir.cellsX = 5000) && (j.reservoir.cellsY = 2000),
      '$.reservoir.cellsX',
      /10000000/,
    ],
    ['part of a cell', (j) => (j.reservoir.cellsX = 10.5), '$.reservoir.cellsX', /whole/],
    [
      'a polygon with two points',
      (j) => j.seismicity.zones[0].polygonM.splice(2),
      '$.seismicity.zones[0].polygonM',
      /at least 3|3 to/,
    ],
    [
      'a polygon on a line',
      (j) =>
        (j.seismicity.zones[0].polygonM = [
          [0, 0],
          [1, 1],
          [2, 2],
        ]),
      '$.seismicity.zones[0].polygonM',
      /area/,
    ],
    [
      'a zone between the cells',
      (j) =>
        (j.seismicity.zones[0].polygonM = [
          [1, 1],
          [2, 1],
          [2, 2],
        ]),
      '$.seismicity.zones[0].polygonM',
      /no cell/,
    ],
    [
      'a barrier of one point',
      (j) => (j.reservoir.barriers[0].lineM = [[1, 1]]),
      '$.reservoir.barriers[0].lineM',
      /entries/,
    ],
    [
      'no weight anywhere',
      (j) => (j.seismicity.zones[0].weight = j.seismicity.elsewhereWeight = 0),
      '$.seismicity.elsewhereWeight',
      /nowhere/,
    ],
    ['a well outside', (j) => (j.wells[0].yM = 4001), '$.wells[0].yM', /outside/],
    ['an observer outside', (j) => (j.observers[0].xM = -1), '$.observers[0].xM', /outside/],
    ['a name given twice', (j) => (j.wells[1].name = 'P-1'), '$.wells[1].name', /twice/],
    [
      'a maximum below the minimum',
      (j) => (j.wells[0].maxRateM3PerS = 0.001),
      '$.wells[0].maxRateM3PerS',
      /below minRate/,
    ],
    [
      'an outage that ends first',
      (j) => (j.wells[0].outages = [{ fromWeek: 3, toWeek: 2 }]),
      '$.wells[0].outages[0].toWeek',
      /before/,
    ],
    [
      'an unknown well in rates',
      (j) => (j.rates = [{ well: 'X-9', weeklyM3PerS: [0] }]),
      '$.rates[0].well',
      /"X-9"/,
    ],
    ['an unknown well in history', (j) => (j.history[0].well = 'X-9'), '$.history[0].well', /"X-9"/],
    [
      'a negative rate',
      (j) => (j.rates = [{ well: 'P-1', weeklyM3PerS: [-0.01] }]),
      '$.rates[0].weeklyM3PerS[0]',
      /at least 0/,
    ],
    [
      'history in the future',
      (j) => (j.history[0].steps[1].fromS = 10),
      '$.history[0].steps[1].fromS',
      /at most 0/,
    ],
    [
      'history out of order',
      (j) => j.history[0].steps.reverse(),
      '$.history[0].steps[1].fromS',
      /after the step before/,
    ],
    [
      'too few weekly rates',
      (j) => (j.rates = [{ well: 'P-1', weeklyM3PerS: [0.01, 0.02] }]),
      '$.rates[0].weeklyM3PerS',
      /1 or 6 or 14/,
    ],
    [
      'too few targets',
      (j) => (j.plan.heatTargetJPerWeek = [1e13, 1e13]),
      '$.plan.heatTargetJPerWeek',
      /1 or 6/,
    ],
    [
      'a ceiling below the target',
      (j) => (j.plan.heatCeilingJPerWeek = [1e13]),
      '$.plan.heatCeilingJPerWeek[0]',
      /below the heat target/,
    ],
    [
      'an objective of a later version',
      (j) => (j.plan.objective = 'leastPumping'),
      '$.plan.objective',
      /not supported/,
    ],
    ['an unknown objective', (j) => (j.plan.objective = 'loudest'), '$.plan.objective', /one of/],
    [
      'a cap on single weeks',
      (j) => (j.plan.caps = [{ scope: 'field', kind: 'weekly', rateMultiple: 2 }]),
      '$.plan.caps[0].kind',
      /not supported/,
    ],
    [
      'a cap on nothing',
      (j) => (j.plan.caps = [{ scope: 'north', kind: 'cumulative', rateMultiple: 2 }]),
      '$.plan.caps[0].scope',
      /"north"/,
    ],
    [
      'a cap of nothing',
      (j) => (j.plan.caps = [{ scope: 'field', kind: 'cumulative', rateMultiple: 0 }]),
      '$.plan.caps[0].rateMultiple',
      /above 0/,
    ],
    [
      'locks',
      (j) => (j.plan.locks = [{ well: 'P-1', week: 1, rateM3PerS: 0.02 }]),
      '$.plan.locks',
      /not supported/,
    ],
    ['a list where an object belongs', (j) => (j.reservoir = []), '$.reservoir', /object, not a list/],
  ];
  it.each(cases)('%s is named with its path', (_what, change, path, why) => {
    const issues = issuesOf(changed(change));
    expect(issues.map((issue) => issue.path)).toContain(path);
    expect(issues.find((issue) => issue.path === path)?.message).toMatch(why);
  });

  it('one mistake is reported once', () => {
    for (const [what, change] of cases.filter(
      ([name]) => !/given twice|well in history|where an object/.test(name),
    )) {
      expect(issuesOf(changed(change)), what).toHaveLength(1);
    }
  });

  it('everything wrong is listed at once', () => {
    const paths = issuesOf(
      changed((json) => {
        json.reservoir.thicknessM = -1;
        json.wells[0].kind = 'pump';
        json.plan.weeks = 0;
        json.extra = 1;
      }),
    ).map((issue) => issue.path);
    expect(paths.sort()).toEqual(['$.extra', '$.plan.weeks', '$.reservoir.thicknessM', '$.wells[0].kind']);
  });

  it.each([null, 3, 'text', [], true])('%j is no scenario', (json) => {
    expect(issuesOf(json)).toEqual([{ path: '$', message: expect.stringContaining('must be an object') }]);
  });
});
