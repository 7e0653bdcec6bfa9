import { z } from 'zod';

import { id } from './common';
import { defineEndpoint } from './define-endpoint';
import { ROLES } from './enums';

export const membership = z.object({
  fieldId: id,
  fieldName: z.string(),
  roles: z.array(z.enum(ROLES)).min(1),
});

export const getMe = defineEndpoint({
  id: 'getMe',
  method: 'GET',
  path: '/api/me',
  summary: 'The signed-in person and their fields',
  access: 'signedIn',
  reply: z.object({
    id,
    name: z.string(),
    email: z.string(),
    memberships: z.array(membership),
  }),
});
export type Me = z.output<typeof getMe.reply>;

/** Sign-in choices of a demonstration server; an empty list in production. */
export const listDemoSignIns = defineEndpoint({
  id: 'listDemoSignIns',
  method: 'GET',
  path: '/api/demo-sign-ins',
  summary: 'Demo accounts of a demonstration server, none in production',
  access: 'public',
  reply: z.object({
    signIns: z.array(
      z.object({ name: z.string(), email: z.string(), password: z.string(), role: z.enum(ROLES) }),
    ),
  }),
});
