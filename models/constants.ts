/** Fixed by convention, not measured. */
export const SECONDS_PER_DAY = 86_400;
export const SECONDS_PER_WEEK = 604_800;
/** The Julian year of 365.25 days. */
export const SECONDS_PER_YEAR = 31_557_600;
