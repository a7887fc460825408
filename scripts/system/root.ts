import path from 'node:path';

/** The repository's folder. */
export const root = path.resolve(import.meta.dirname, '../..');
