import express, { Router, type Express } from 'express';
import { pinoHttp } from 'pino-http';

import { authRoutes } from './auth/routes';
import type { Context } from './context';
import { boundEndpoints } from './endpoints';
import { notFound } from './errors';
import { onError } from './http/on-error';
import { limitApi } from './http/rate-limit';
import { sameOrigin } from './http/same-origin';
import { securityHeaders } from './http/security-headers';
import { webApp } from './http/web-app';

export function makeApp(context: Context): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', context.config.trustedProxies);
  app.use(pinoHttp({ logger: context.log, customLogLevel: quietLevel }));
  app.use(securityHeaders(context.config));
  app.use('/api', limitApi(), sameOrigin(context), express.json({ limit: '100kb' }));
  app.use('/api/auth', authRoutes(context));
  app.use(apiRoutes(context));
  app.use('/api', () => {
    throw notFound('This address');
  });
  app.use(webApp(context.config.webRoot));
  app.use(() => {
    throw notFound('This page');
  });
  app.use(onError(context));
  return app;
}

function apiRoutes(context: Context): Router {
  const router = Router();
  for (const bound of Object.values(boundEndpoints)) {
    const method = bound.contract.method.toLowerCase() as 'get' | 'post' | 'patch' | 'delete';
    router[method](bound.contract.path, (req, res) => bound.answer(context, req, res));
  }
  return router;
}

/** Ordinary requests are noise in the log; what went wrong is written by `on-error.ts` with its reason. */
const quietLevel = () => 'debug' as const;
