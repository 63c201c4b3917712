import { createHash, randomBytes } from 'node:crypto';

const randomByteCount = 32;
/** Makes a token that has strayed into a file or a log recognisable. */
const prefix = 'bw_';

/** A new token of 256 random bits. */
export const makeTokenSecret = (): string => prefix + randomBytes(randomByteCount).toString('base64url');

/** What is kept of a token. */
export const digestOfToken = (secret: string): string => createHash('sha256').update(secret).digest('hex');
