import { and, asc, eq } from 'drizzle-orm';

import type { Role } from '../../src/contract/enums';
import type { Db } from '../client';
import { fields, memberships } from '../schema/fields';
import { accounts, people } from '../schema/people';

export type PersonRow = typeof people.$inferSelect;

export function insertPerson(
  db: Db,
  person: {
    id: string;
    name: string;
    email: string;
    passwordHash: string;
    isDemo: boolean;
    createdAt: number;
  },
): void {
  const moment = new Date(person.createdAt);
  const { id, name, email, isDemo } = person;
  db.insert(people)
    .values({
      id,
      name,
      email: email.toLowerCase(),
      emailVerified: true,
      isDemo,
      createdAt: moment,
      updatedAt: moment,
    })
    .run();
  db.insert(accounts)
    .values({
      id: `${id}-password`,
      accountId: id,
      providerId: 'credential',
      userId: id,
      password: person.passwordHash,
      createdAt: moment,
      updatedAt: moment,
    })
    .run();
}

export function findPersonByEmail(db: Db, email: string): PersonRow | undefined {
  return db.select().from(people).where(eq(people.email, email.toLowerCase())).get();
}

export function countPeople(db: Db): number {
  return db.select({ id: people.id }).from(people).all().length;
}

export function listDemoPeople(db: Db): PersonRow[] {
  return db.select().from(people).where(eq(people.isDemo, true)).orderBy(asc(people.email)).all();
}

export function insertMembership(
  db: Db,
  membership: { fieldId: string; personId: string; role: Role; createdAt: number },
): void {
  db.insert(memberships).values(membership).run();
}

export function rolesIn(db: Db, fieldId: string, personId: string): Role[] {
  return db
    .select({ role: memberships.role })
    .from(memberships)
    .where(and(eq(memberships.fieldId, fieldId), eq(memberships.personId, personId)))
    .all()
    .map((row) => row.role);
}

export function listMemberships(
  db: Db,
  personId: string,
): { fieldId: string; fieldName: string; role: Role }[] {
  return db
    .select({ fieldId: memberships.fieldId, fieldName: fields.name, role: memberships.role })
    .from(memberships)
    .innerJoin(fields, eq(fields.id, memberships.fieldId))
    .where(eq(memberships.personId, personId))
    .orderBy(asc(fields.name))
    .all();
}
