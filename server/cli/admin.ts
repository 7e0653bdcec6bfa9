import { randomUUID } from 'node:crypto';
import { parseArgs } from 'node:util';

import { hashPassword } from 'better-auth/crypto';

import { openDatabase } from '../../db/client';
import { migrateDatabase } from '../../db/migrate';
import { recordAudit } from '../../db/store/audit';
import { listAllFieldIds } from '../../db/store/fields';
import { findPersonByEmail, insertMembership, insertPerson } from '../../db/store/people';
import { MIN_PASSWORD_LENGTH } from '../auth/auth';
import { ConfigError, readConfig } from '../config';

const HELP = `Creates an administrator, the first person of a new server. The password is read from standard input.

  node --import tsx server/cli/admin.ts --name "First Last" --email person@example.com < password-file

The administrator becomes a member of every field there is.`;

/** Something the caller can put right; no stack trace. */
class UsageError extends Error {}

async function readPassword(): Promise<string> {
  if (process.stdin.isTTY) console.error('Password (it is shown while you type), then Enter and Ctrl-D:');
  const chunks: Buffer[] = [];
  for await (const chunk of process.stdin) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks)
    .toString('utf8')
    .replace(/\r?\n$/, '');
}

async function createAdministrator(): Promise<string> {
  const { values } = parseArgs({
    options: { name: { type: 'string' }, email: { type: 'string' }, help: { type: 'boolean' } },
  });
  if (values.help) return HELP;
  const name = values.name?.trim();
  const email = values.email?.trim();
  if (!name) throw new UsageError(`--name is missing.\n\n${HELP}`);
  if (!email || !/^[^@\s]+@[^@\s]+$/.test(email))
    throw new UsageError(`--email is not an address.\n\n${HELP}`);
  const password = await readPassword();
  if (password.length < MIN_PASSWORD_LENGTH) {
    throw new UsageError(`The password needs at least ${MIN_PASSWORD_LENGTH} characters.`);
  }
  const passwordHash = await hashPassword(password);
  const { databaseFile } = readConfig(process.env);
  migrateDatabase(databaseFile);
  const { db, close } = openDatabase(databaseFile);
  try {
    const fields = db.transaction((tx) => {
      if (findPersonByEmail(tx, email)) throw new UsageError(`${email} has an account already.`);
      const id = randomUUID();
      const createdAt = Date.now();
      insertPerson(tx, { id, name, email, passwordHash, isDemo: false, createdAt });
      const fieldIds = listAllFieldIds(tx);
      for (const fieldId of fieldIds) {
        insertMembership(tx, { fieldId, personId: id, role: 'administrator', createdAt });
      }
      recordAudit(tx, {
        happenedAt: createdAt,
        fieldId: null,
        personId: id,
        event: 'administratorCreated',
        subjectId: id,
      });
      return fieldIds.length;
    });
    return `${name} can sign in as ${email}, administrator of ${fields} field${fields === 1 ? '' : 's'}.`;
  } finally {
    close();
  }
}

try {
  console.log(await createAdministrator());
} catch (error) {
  const expected = error instanceof UsageError || error instanceof ConfigError;
  console.error(expected ? (error as Error).message : error);
  process.exitCode = expected ? 2 : 1;
}
