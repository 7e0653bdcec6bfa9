import pino, { type Logger } from 'pino';

export type { Logger };

/** Nothing that opens a door may reach the log, wherever it hides in what is logged. */
const SECRETS = [
  'password',
  '*.password',
  'token',
  '*.token',
  'authSecret',
  '*.authSecret',
  'smtpUrl',
  '*.smtpUrl',
  'req.headers.cookie',
  'req.headers.authorization',
  'res.headers["set-cookie"]',
];

export function makeLogger(level: string, destination?: pino.DestinationStream): Logger {
  const options = { level, base: null, timestamp: pino.stdTimeFunctions.isoTime };
  const withRedaction = { ...options, redact: { paths: SECRETS, censor: '[hidden]' } };
  return destination ? pino(withRedaction, destination) : pino(withRedaction);
}
