import { integer, text } from 'drizzle-orm/sqlite-core';

/** A moment: UTC milliseconds. The column's name ends in `_at`. */
export const at = (name: string) => integer(name);

export const id = (name = 'id') => text(name);

/** Parsed and checked by whoever reads it; stored as text so that it comes back byte for byte. */
export const jsonText = (name: string) => text(name);
