/** Everything of a field lies under its own key: a change in the field makes all of it stale at once. */
export const keys = {
  me: ['me'] as const,
  demoSignIns: ['demo-sign-ins'] as const,
  health: ['health'] as const,
  fields: ['fields'] as const,
  field: (fieldId: string) => ['field', fieldId] as const,
  fieldWeek: (fieldId: string) => ['field', fieldId, 'week'] as const,
  plans: (fieldId: string) => ['field', fieldId, 'plans'] as const,
  planDefaults: (fieldId: string) => ['field', fieldId, 'plan-defaults'] as const,
  plan: (fieldId: string, planId: string) => ['field', fieldId, 'plan', planId] as const,
  jobs: (fieldId: string) => ['field', fieldId, 'jobs'] as const,
  job: (fieldId: string, jobId: string) => ['field', fieldId, 'job', jobId] as const,
};
