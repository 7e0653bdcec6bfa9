import { yes, type Decision } from '../../http/decision';

/** Whether the server works and what it offers is no secret. */
export const mayLookFromOutside = (): Decision => yes;
