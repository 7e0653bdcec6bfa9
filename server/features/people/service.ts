import { listDemoPeople } from '../../../db/store/people';
import type { Context } from '../../context';
import { DEMO_PEOPLE } from '../../demo/people';

/** Demo accounts that this server really has. */
export function demoSignIns(context: Context): typeof DEMO_PEOPLE {
  if (!context.config.demo) return [];
  const known = new Set(listDemoPeople(context.database.db).map((person) => person.email));
  return DEMO_PEOPLE.filter((person) => known.has(person.email));
}
