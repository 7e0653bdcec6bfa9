/** What goes between the server and the thread that computes. */
export interface WorkOrder {
  scenario: unknown;
  /** One 32-bit integer; 1: stop as soon as you can. */
  stopFlag: SharedArrayBuffer;
}

export interface Failure {
  code: string;
  /** For the person. */
  message: string;
  details: string[];
  /** For the log. */
  log?: string;
}

export type WorkerMessage =
  | { type: 'progress'; fraction: number; step: string }
  | { type: 'done'; result: unknown }
  | { type: 'stopped' }
  | { type: 'failed'; failure: Failure };
