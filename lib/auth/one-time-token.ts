/** Tokens for links, invitations and the API: 256 random bits; only their SHA-256 is stored. */
import { createHash, randomBytes } from 'node:crypto';

export const newToken = (): string => randomBytes(32).toString('base64url');
export const hashToken = (token: string): string => createHash('sha256').update(token).digest('hex');
/** What a token may look like; anything else is not looked up. */
export const TOKEN_PATTERN = /^[A-Za-z0-9_-]{43}$/;
