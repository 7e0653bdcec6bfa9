import { yes, type Decision } from '../../http/decision';
import type { Member } from '../../http/endpoint';
import type { Actor } from '../../http/session';

/** Everybody may list the fields they are a member of; the list holds no others. */
export const mayListFields = (_who: Actor): Decision => yes;

/** Every role of a field may read it. */
export const mayReadField = (_who: Member): Decision => yes;
