// `npm test`: everything there is, in order, on a machine with two cores. Each step of the tool chain counts as
// one, every test as itself. The last line is the sum; the exit code tells whether all of it passed.
import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

import { prepareDatabaseDriver } from '../../server/cli/database-driver.mjs';
import { installDebianPackages } from '../../server/cli/debian-packages.mjs';
import { buildWebBundle, EXPO_SETTINGS } from '../../server/cli/web-bundle.mjs';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const REPORTS = join(ROOT, 'test-results');
const CHROMIUM = process.env.CHROMIUM ?? '/usr/bin/chromium';

const startedAt = Date.now();
const sum = { passed: 0, failed: 0 };
rmSync(REPORTS, { recursive: true, force: true });
mkdirSync(REPORTS, { recursive: true });

await step('database driver', async () => prepareDatabaseDriver());
// The bundle and the checks of the sources need nothing from each other.
await Promise.all([step('web bundle', buildWebBundle), checkSources()]);
await unitTests();
await browserTests();
finish();

async function checkSources() {
  await step('route types', () => run('expo', ['customize', 'tsconfig.json'], EXPO_SETTINGS));
  for (const part of ['models', 'server', 'tests', 'tests/src', '.']) {
    await step(`types of ${part === '.' ? 'app and src' : part}`, () => run('tsc', ['-p', part, '--noEmit']));
  }
  await step('lint', () => run('eslint', ['.', '--max-warnings', '0']));
  await step('format', () => run('prettier', ['--check', '--log-level', 'warn', '.']));
  await step('unused code', () => run('knip', []));
}

async function unitTests() {
  const report = join(REPORTS, 'unit.json');
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const code = await run('vitest', ['run', ...reporters], {}, 'inherit').catch(() => 1);
  count('unit tests', code ?? 0, report, (json) => ({
    passed: json.numPassedTests,
    // A file that could not even be read has no tests to count.
    failed: json.numFailedTests + json.testResults.filter(isBrokenFile).length,
  }));
}

function isBrokenFile({ status, assertionResults }) {
  return status === 'failed' && assertionResults.length === 0;
}

async function browserTests() {
  if (!existsSync(CHROMIUM) && !installDebianPackages(['chromium'])) {
    const advice = 'Install it with "sudo apt-get install chromium", or set CHROMIUM to where it is.';
    return fail('browser tests', new Error(`There is no Chromium at ${CHROMIUM}. ${advice}`));
  }
  const report = join(REPORTS, 'browser.json');
  const settings = { PLAYWRIGHT_JSON_OUTPUT_NAME: report, CHROMIUM };
  const code = await run('playwright', ['test', '--reporter=list,json'], settings, 'inherit').catch(() => 1);
  count('browser tests', code ?? 0, report, ({ stats, errors }) => ({
    passed: stats.expected,
    failed: stats.unexpected + stats.flaky + errors.length,
  }));
}

async function step(name, act) {
  const from = Date.now();
  try {
    await act();
    sum.passed += 1;
    console.log(`ok      ${name} (${seconds(from)} s)`);
  } catch (error) {
    fail(name, error);
  }
}

function fail(name, error) {
  sum.failed += 1;
  console.log(`FAILED  ${name}\n${error.message}`);
}

/** Takes a test runner's own count; one that failed without a failed test counts as a failure too. */
function count(name, code, report, read) {
  const counted = existsSync(report)
    ? read(JSON.parse(readFileSync(report, 'utf8')))
    : { passed: 0, failed: 0 };
  sum.passed += counted.passed;
  sum.failed += counted.failed;
  if (counted.failed > 0 || (code === 0 && counted.passed > 0)) return;
  fail(name, new Error(`The runner ended with ${code} and ${counted.passed} tests.`));
}

/** Runs one of the project's tools; rejects with its output where it fails. */
function run(tool, words, settings = {}, output = 'pipe') {
  const child = spawn(join(ROOT, 'node_modules', '.bin', tool), words, {
    cwd: ROOT,
    env: { ...process.env, ...settings },
    stdio: ['ignore', output, output],
  });
  let text = '';
  for (const stream of [child.stdout, child.stderr]) stream?.on('data', (part) => (text += part));
  return new Promise((done, failed) => {
    child.once('error', failed);
    child.once('close', (code) => (code === 0 ? done(0) : failed(new Error(text.trimEnd()))));
  });
}

function seconds(from) {
  return ((Date.now() - from) / 1000).toFixed(0);
}

function finish() {
  console.log(`\nAll of it took ${seconds(startedAt)} s.`);
  console.log(`${sum.passed} passed, ${sum.failed} failed`);
  process.exitCode = sum.failed === 0 ? 0 : 1;
}
