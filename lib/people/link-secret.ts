import 'server-only';
import { createHash, randomBytes } from 'node:crypto';

/** 32 random bytes as base64url: what a letter carries and nobody keeps. */
export const newSecret = () => randomBytes(32).toString('base64url');

/** What is kept of a secret. A plain hash will do: there is nothing to guess in 256 random bits. */
export const hashOfSecret = (secret: string) => createHash('sha256').update(secret).digest('hex');
