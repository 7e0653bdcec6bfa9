/** Closed lists shared by the database, the server and the screens. No imports: db reads this file. */

export const ROLES = ['fieldEngineer', 'productionLead', 'hseOfficer', 'administrator'] as const;
export type Role = (typeof ROLES)[number];

export const WELL_KINDS = ['producer', 'injector', 'monitor'] as const;
export type WellKind = (typeof WELL_KINDS)[number];

export const PLAN_STATES = [
  'draft',
  'inReview',
  'signed',
  'issued',
  'closed',
  'returned',
  'withdrawn',
] as const;
export type PlanState = (typeof PLAN_STATES)[number];

export const OBJECTIVES = ['quietest'] as const;
export type Objective = (typeof OBJECTIVES)[number];

export const JOB_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export type JobState = (typeof JOB_STATES)[number];

export const JOB_KINDS = ['plan.build'] as const;
export type JobKind = (typeof JOB_KINDS)[number];

export const BOUNDARY_KINDS = ['noFlow', 'fixedPressure'] as const;
export type BoundaryKind = (typeof BOUNDARY_KINDS)[number];
