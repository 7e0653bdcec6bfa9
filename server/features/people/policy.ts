import { yes, type Decision } from '../../http/decision';
import type { Actor } from '../../http/session';

/** Everybody may read who they are. */
export const mayReadSelf = (_who: Actor): Decision => yes;

/** The sign-in page is public, and so are the accounts that a demonstration offers on it. */
export const mayReadDemoSignIns = (): Decision => yes;
