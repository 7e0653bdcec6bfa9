import { z } from 'zod';

/** Every refusal has this shape. `message` is the sentence for the person; the log keeps its own. */
export const errorReply = z.object({
  error: z.object({
    code: z.string(),
    message: z.string(),
    fields: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  }),
});
export type ErrorReply = z.output<typeof errorReply>;

/** Codes that any endpoint may answer with. */
export const COMMON_ERRORS = {
  NOT_SIGNED_IN: 401,
  NOT_ALLOWED: 403,
  NOT_FOUND: 404,
  BAD_REQUEST: 422,
  TOO_MANY_REQUESTS: 429,
  INTERNAL: 500,
} as const;
