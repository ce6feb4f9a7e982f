/** Reads who a request claims to be: a bearer token (looked up by its hash) or the signed session cookie of next-auth. */
import 'server-only';
import { eq } from 'drizzle-orm';
import { type JWT, getToken } from 'next-auth/jwt';
import { cookies, headers } from 'next/headers';
import type { NextRequest } from 'next/server';
import { withScope } from '@/db/client';
import { apiToken } from '@/db/schema/people';
import type { Credentials } from './load-actor';
import { hashToken } from './one-time-token';

/** Of a route handler's request; null where nothing valid was sent. */
export async function credentialsOf(request: NextRequest): Promise<Credentials | null> {
  const authorisation = request.headers.get('authorization');
  if (authorisation !== null) {
    const bearer = /^Bearer ([\x21-\x7e]{20,200})$/.exec(authorisation)?.[1];
    return bearer === undefined ? null : tokenCredentials(bearer);
  }
  return sessionCredentials(await getToken({ req: request }));
}

/** Of the page being rendered. */
export async function credentialsOfPage(): Promise<Credentials | null> {
  const [jar, sent] = await Promise.all([cookies(), headers()]);
  const request = {
    cookies: Object.fromEntries(jar.getAll().map(({ name, value }) => [name, value])),
    headers: Object.fromEntries(sent.entries()),
  };
  return sessionCredentials(await getToken({ req: request as unknown as NextRequest }));
}

function sessionCredentials(token: JWT | string | null): Credentials | null {
  if (
    !token ||
    typeof token === 'string' ||
    typeof token.personId !== 'string' ||
    typeof token.workshopId !== 'string' ||
    typeof token.sessionEpoch !== 'number'
  )
    return null;
  return { via: 'session', personId: token.personId, workshopId: token.workshopId, sessionEpoch: token.sessionEpoch };
}

async function tokenCredentials(bearer: string): Promise<Credentials | null> {
  return withScope('auth', async (tx) => {
    const [row] = await tx
      .select({ id: apiToken.id, personId: apiToken.personId, workshopId: apiToken.workshopId })
      .from(apiToken)
      .where(eq(apiToken.tokenHash, hashToken(bearer)));
    return row ? { via: 'token' as const, personId: row.personId, workshopId: row.workshopId, tokenId: row.id } : null;
  });
}
