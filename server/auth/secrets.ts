import { createHash, randomBytes } from 'node:crypto';

/** 256 bits from the system, as 43 characters that fit in an address. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

/** What is kept of a secret. It is random and long, so a plain fast hash is enough. */
export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');
