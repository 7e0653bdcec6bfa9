import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';

import type { Db } from '../../db/client';
import { accounts, people, sessions, verifications } from '../../db/schema/people';
import type { Config } from '../config';
import type { Logger } from '../log';

const DAY_S = 86_400;

/** E-mail and password, sessions in the database. People are made by an administrator, never by sign-up. */
export function makeAuth(config: Config, db: Db, log: Logger) {
  return betterAuth({
    appName: 'Stillfield',
    baseURL: config.publicUrl,
    basePath: '/api/auth',
    secret: config.authSecret,
    database: drizzleAdapter(db, {
      provider: 'sqlite',
      schema: { user: people, session: sessions, account: accounts, verification: verifications },
    }),
    emailAndPassword: { enabled: true, disableSignUp: true, minPasswordLength: MIN_PASSWORD_LENGTH },
    session: { expiresIn: 14 * DAY_S, updateAge: DAY_S },
    trustedOrigins: (request) => trustedOrigins(config, request?.headers.get('host') ?? null),
    // Sign-in is limited by `http/rate-limit.ts`, where the caller's address is known.
    rateLimit: { enabled: false },
    telemetry: { enabled: false },
    logger: { log: (level, message) => log[level]({ part: 'sign-in' }, message) },
    advanced: {
      useSecureCookies: config.publicUrl.startsWith('https:'),
      cookiePrefix: 'stillfield',
      // The library switches both off by itself under NODE_ENV=test; here they are on everywhere.
      disableOriginCheck: false,
      disableCSRFCheck: false,
    },
  });
}

export type Auth = ReturnType<typeof makeAuth>;

export const MIN_PASSWORD_LENGTH = 12;

/**
 * Origins whose pages may change something here. In production the public address alone; elsewhere also
 * the host that was asked, so that a demonstration works under whatever name the machine has.
 */
export function trustedOrigins(config: Config, host: string | null): string[] {
  if (config.production || !host) return [config.publicUrl];
  return [config.publicUrl, `http://${host}`];
}
