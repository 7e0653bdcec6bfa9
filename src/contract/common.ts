import { z } from 'zod';

/** Identifiers are opaque to clients. */
export const id = z.string().min(1).max(64);

/** A moment: UTC milliseconds since 1970. */
export const at = z.number().int();

export const person = z.object({ id, name: z.string() });
