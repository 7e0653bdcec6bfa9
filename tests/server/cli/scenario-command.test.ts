import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

import { afterAll, describe, expect, it } from 'vitest';

import { smallScenario } from '../../support/small-scenario';

const root = fileURLToPath(new URL('../../../', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'scenario-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Runs the command as the README says; `text` becomes the file. */
function run(command: string, text: string) {
  const file = join(folder, 'scenario.json');
  writeFileSync(file, text);
  return runWords(command, file);
}

function runWords(...words: string[]) {
  const { status, stdout, stderr } = spawnSync('npm', ['run', '-s', 'scenario', '--', ...words], {
    cwd: root,
    encoding: 'utf8',
    timeout: 60_000,
  });
  return { status, stdout, stderr };
}

const withChange = (change: (scenario: ReturnType<typeof smallScenario>) => void) => {
  const scenario = smallScenario();
  change(scenario);
  return JSON.stringify(scenario);
};

describe('scenario command', () => {
  it('forecast: the keys of the format, nothing else on standard output', () => {
    const { status, stdout, stderr } = run('forecast', JSON.stringify(smallScenario()));
    expect(status, stderr).toBe(0);
    const answer = JSON.parse(stdout);
    expect(answer.weeks).toHaveLength(14);
    expect(answer.weeks[0]).toMatchObject({
      week: 1,
      expectedEvents: expect.any(Number),
      rateMultiple: expect.any(Number),
      zones: [{ name: 'south strand', expectedEvents: expect.any(Number), rateMultiple: expect.any(Number) }],
      observers: [{ name: 'OB-1', overpressurePa: expect.any(Number) }],
      heatJ: expect.any(Number),
    });
    expect(answer.weeks[0].wells[0]).toMatchObject({
      name: 'P-1',
      bottomHoleEndPa: expect.any(Number),
      bottomHoleMinPa: expect.any(Number),
      bottomHoleMaxPa: expect.any(Number),
    });
    expect(Object.keys(answer.totals).sort()).toEqual([
      'backgroundEvents',
      'expectedEvents',
      'heatJ',
      'rateMultiple',
    ]);
    expect(answer.inputHash).toMatch(/^[0-9a-f]{64}$/);
    expect(answer.modelVersion).toMatch(/^\d+\.\d+\.\d+$/);
  });

  it('plan: rates, bound, gap, prices, comparison and check', () => {
    const { status, stdout, stderr } = run('plan', JSON.stringify(smallScenario()));
    expect(status, stderr).toBe(0);
    const answer = JSON.parse(stdout);
    expect(answer.rates).toHaveLength(5);
    expect(answer.rates[0].weeklyM3PerS).toHaveLength(6);
    expect(answer.lowerBound).toBeLessThanOrEqual(answer.expectedEvents);
    expect(answer.gap).toBeLessThan(1e-3);
    expect(answer.seconds).toBeGreaterThan(0);
    expect(answer.rounds).toBeGreaterThan(0);
    expect(answer.binding[0]).toMatchObject({
      limit: expect.any(String),
      price: expect.any(Number),
      unit: expect.any(String),
    });
    expect(answer.comparison.hold.expectedEvents).toBeGreaterThan(answer.expectedEvents);
    expect(answer.check.relativeDifference).toBeLessThan(0.01);
  });

  it('a bad file: exit 2 and every offending value with its path', () => {
    const text = withChange((scenario) => {
      scenario.reservoir.thicknessM = -250;
      scenario.rates = [{ well: 'X-1', weeklyM3PerS: [0.01] }];
    }).replace('"aSigmaPa":150000', '"aSigmaPa":NaN');
    const { status, stdout, stderr } = run('plan', text);
    expect(status).toBe(2);
    const { error } = JSON.parse(stdout);
    expect(error.code).toBe('BAD_SCENARIO');
    expect(error.issues.map((issue: { path: string }) => issue.path)).toEqual([
      '$.reservoir.thicknessM',
      '$.seismicity.aSigmaPa',
      '$.rates[0].well',
    ]);
    expect(stderr).toContain('$.reservoir.thicknessM');
  });

  it('no plan: exit 3 and the limits that collide, with amounts', () => {
    const { status, stdout } = run(
      'plan',
      withChange(({ plan }) => {
        plan!.heatTargetJPerWeek = [4e13];
        plan!.heatCeilingJPerWeek = [];
      }),
    );
    expect(status).toBe(3);
    const { error } = JSON.parse(stdout);
    expect(error.code).toBe('NO_PLAN');
    expect(error.colliding[0]).toMatchObject({
      limit: 'heatTarget',
      week: 1,
      unit: 'J',
      sentence: expect.any(String),
    });
    expect(error.colliding[0].amount).toBeGreaterThan(1e12);
  });

  it.each([
    ['no JSON', '{ "format": ', /not JSON/],
    ['an empty file', '', /not JSON/],
  ])('%s: exit 2', (_what, text, why) => {
    const { status, stdout, stderr } = run('forecast', text);
    expect(status).toBe(2);
    expect(JSON.parse(stdout).error.issues[0].path).toBe('$');
    expect(stderr).toMatch(why);
  });

  it('a file that is not there, a command that does not exist: exit 2', () => {
    expect(runWords('plan', join(folder, 'nowhere.json'))).toMatchObject({
      status: 2,
      stderr: expect.stringContaining('ENOENT'),
    });
    expect(runWords('plot', 'x.json')).toMatchObject({ status: 2, stdout: '' });
  });

  it('--help explains the exit codes', () => {
    expect(runWords('--help')).toMatchObject({ status: 0, stdout: expect.stringContaining('Exit codes') });
  });
});
