import { NoPlanError, NumericalError, ScenarioError } from '../../models/errors';
import type { Failure } from './messages';

/** What went wrong in a computation, for the person whose plan it was. */
export function failureOf(error: unknown): Failure {
  if (error instanceof NoPlanError) {
    return {
      code: 'NO_PLAN',
      message: 'No plan keeps every limit. These collide:',
      details: error.colliding.map((limit) => limit.sentence),
    };
  }
  if (error instanceof ScenarioError) {
    return {
      code: 'BAD_SCENARIO',
      message: 'The field as it is set up cannot be planned for.',
      details: error.issues.map((issue) => `${issue.path}: ${issue.message}`),
    };
  }
  const log = error instanceof Error ? (error.stack ?? error.message) : String(error);
  if (error instanceof NumericalError) {
    const message = 'The computation did not reach its accuracy, so there is no result to trust.';
    return { code: 'NOT_ACCURATE', message, details: [error.message], log };
  }
  const message = 'The computation stopped because of a mistake in the program. It has been written down.';
  return { code: 'INTERNAL', message, details: [], log };
}

export const interrupted: Failure = {
  code: 'INTERRUPTED',
  message: 'The server stopped twice while this was being computed. It was not tried a third time.',
  details: [],
};

export const tooLong = (seconds: number): Failure => ({
  code: 'TOO_LONG',
  message: `The computation was stopped after ${Math.round(seconds / 60)} minutes, the limit on this server.`,
  details: ['Fewer weeks or a shorter look-ahead need less time.'],
});

export const crashed = (reason: string): Failure => ({
  code: 'CRASHED',
  message: 'The computation broke off, most likely for want of memory.',
  details: [],
  log: reason,
});
