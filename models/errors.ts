/** One offending value of an input: where it is (JSON path) and why it cannot be used. */
export interface InputIssue {
  path: string;
  message: string;
}

/** The input cannot be used; every offending value is listed. */
export class ScenarioError extends Error {
  constructor(readonly issues: InputIssue[]) {
    super(issues.map((issue) => `${issue.path}: ${issue.message}`).join('\n'));
    this.name = 'ScenarioError';
  }
}

/** A limit that takes part in a collision. */
export interface CollidingLimit {
  limit: string;
  well?: string;
  /** Of a cap on events: the field or a zone's name. */
  scope?: string;
  week?: number;
  /** How far the limit would have to give way, in `unit`; 0 where it collides but need not move. */
  amount: number;
  unit: string;
  /** The same as one plain sentence with units of people. */
  sentence: string;
}

/** No plan keeps every limit. */
export class NoPlanError extends Error {
  constructor(readonly colliding: CollidingLimit[]) {
    super(colliding.map((limit) => limit.sentence).join('\n'));
    this.name = 'NoPlanError';
  }
}

/** A computation that did not reach its accuracy: never a silent number. */
export class NumericalError extends Error {
  constructor(
    message: string,
    readonly diagnostics: Record<string, number | string> = {},
  ) {
    super(message);
    this.name = 'NumericalError';
  }
}

/** The caller asked to stop. */
export class StoppedError extends Error {
  constructor() {
    super('stopped on request');
    this.name = 'StoppedError';
  }
}
