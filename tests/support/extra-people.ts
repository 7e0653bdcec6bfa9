import { randomUUID } from 'node:crypto';

import { hashPassword } from 'better-auth/crypto';

import { insertField } from '../../db/store/fields';
import { insertMembership, insertPerson } from '../../db/store/people';
import type { Role } from '../../src/contract/enums';
import type { Caller, TestServer } from './test-server';

/** Somebody beyond the crew of the small field, signed in; with `roles` in `fieldId` where given. */
export async function addPerson(
  server: TestServer,
  { name = 'Wren Lowmoor', roles = [] as Role[], fieldId = server.fieldId } = {},
): Promise<Caller & { id: string }> {
  const id = randomUUID();
  const email = `${id.slice(0, 8)}@example.com`;
  const password = 'a password for tests';
  const createdAt = Date.now();
  const { db } = server.context.database;
  insertPerson(db, { id, name, email, passwordHash: await hashPassword(password), isDemo: false, createdAt });
  for (const role of roles) insertMembership(db, { fieldId, personId: id, role, createdAt });
  return { ...(await server.signIn(email, password)), id };
}

/** A second field without wells, model or readings. */
export function addEmptyField(server: TestServer, name = 'Bare Moor'): string {
  const id = randomUUID();
  insertField(server.context.database.db, {
    id,
    name,
    place: 'Elsewhere',
    timeZone: 'Europe/London',
    rateMultipleLimit: 1.5,
    createdAt: Date.now(),
  });
  return id;
}
