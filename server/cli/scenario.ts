/**
 * The command line for scenario files: everything a forecast or a plan depends on in, the numbers out.
 *
 * One JSON document goes to standard output and nothing else; words for people go to standard error.
 */
import { readFileSync } from 'node:fs';

import { NoPlanError, NumericalError, ScenarioError } from '../../models/errors';
import { forecastScenario } from '../../models/scenario/forecast-scenario';
import { planScenario } from '../../models/scenario/plan-scenario';
import { readScenario } from '../../models/scenario/read-scenario';
import { inputHash } from '../canonical-json';

const HELP = `Forecast or plan from a scenario file.

  npm run -s scenario -- forecast FILE.json    rates as given in the file → forecast as JSON
  npm run -s scenario -- plan FILE.json        rates chosen by the planner → plan and forecast as JSON

FILE.json holds one scenario of format "stillfield-scenario/1" ("-" reads standard input); the README describes
its keys. Units are SI. The answer goes to standard output, everything else to standard error.

Exit codes
  0  the answer is on standard output
  1  the computation failed or did not reach its accuracy
  2  the command or the file cannot be used; each offending value with its path
  3  no plan keeps every limit; the limits that collide, with amounts
`;

const EXIT = { done: 0, failed: 1, badInput: 2, noPlan: 3 } as const;

process.exitCode = await main(process.argv.slice(2));

async function main(words: string[]): Promise<number> {
  if (words.includes('--help') || words.includes('-h')) {
    process.stdout.write(HELP);
    return EXIT.done;
  }
  const [command, file, ...more] = words;
  if ((command !== 'forecast' && command !== 'plan') || file === undefined || more.length > 0) {
    process.stderr.write(`Not a command: ${words.join(' ') || '(nothing)'}\n\n${HELP}`);
    return EXIT.badInput;
  }
  try {
    const json = readJson(file);
    const scenario = readScenario(json);
    const hooks = { now: () => performance.now() / 1000 };
    const result =
      command === 'plan' ? await planScenario(scenario, hooks) : forecastScenario(scenario, hooks);
    answer({ ...result, inputHash: inputHash(json) });
    for (const warning of result.diagnostics.warnings) process.stderr.write(`Note: ${warning}\n`);
    return EXIT.done;
  } catch (error) {
    return explain(error);
  }
}

function readJson(file: string): unknown {
  let text: string;
  try {
    text = readFileSync(file === '-' ? 0 : file, 'utf8');
  } catch (error) {
    throw new ScenarioError([
      { path: file, message: `cannot be read (${(error as NodeJS.ErrnoException).code})` },
    ]);
  }
  try {
    return JSON.parse(withoutBareWords(text));
  } catch (error) {
    throw new ScenarioError([{ path: '$', message: `is not JSON: ${(error as Error).message}` }]);
  }
}

/**
 * NaN and Infinity are no JSON, but programs write them. They become a number too large for a double, so that
 * each is reported with its path and not as a position in the text.
 */
function withoutBareWords(text: string): string {
  return text.replace(/"(?:[^"\\]|\\.)*"|-?\b(?:NaN|Infinity)\b/g, (part) =>
    part.startsWith('"') ? part : '1e999',
  );
}

function explain(error: unknown): number {
  if (error instanceof ScenarioError) {
    answer({
      error: { code: 'BAD_SCENARIO', message: 'The scenario cannot be used.', issues: error.issues },
    });
    process.stderr.write(`The scenario cannot be used:\n${error.message}\n`);
    return EXIT.badInput;
  }
  if (error instanceof NoPlanError) {
    answer({ error: { code: 'NO_PLAN', message: 'No plan keeps every limit.', colliding: error.colliding } });
    process.stderr.write(`No plan keeps every limit. These collide:\n${error.message}\n`);
    return EXIT.noPlan;
  }
  const code = error instanceof NumericalError ? 'NOT_ACCURATE' : 'INTERNAL';
  const message = error instanceof Error ? error.message : String(error);
  const diagnostics = error instanceof NumericalError ? error.diagnostics : {};
  answer({ error: { code, message, ...diagnostics } });
  process.stderr.write(`${error instanceof Error ? (error.stack ?? message) : message}\n`);
  return EXIT.failed;
}

function answer(result: unknown): void {
  process.stdout.write(`${JSON.stringify(result, null, 2)}\n`);
}
