/** Ending the session of this browser, and moving it to another workshop of the same person, from a form without script. */
import 'server-only';
import { encode, getToken } from 'next-auth/jwt';
import { cookies, headers } from 'next/headers';
import type { NextRequest } from 'next/server';
import { withScope } from '@/db/client';
import { sessionOf } from './sign-in';

const SESSION_SECONDS = 12 * 60 * 60;
const isSecure = (): boolean => (process.env.NEXTAUTH_URL ?? '').startsWith('https:');
/** next-auth's own names: the prefix binds the cookie to https where there is https. */
const cookieName = (): string => (isSecure() ? '__Secure-next-auth.session-token' : 'next-auth.session-token');

export async function endSession(): Promise<void> {
  const jar = await cookies();
  for (const { name } of jar.getAll()) if (name.startsWith(cookieName())) jar.delete(name);
}

/** False where the person does not belong to that workshop; the session then stays as it is. */
export async function moveSession(workshopId: string): Promise<boolean> {
  const [jar, sent] = await Promise.all([cookies(), headers()]);
  const request = {
    cookies: Object.fromEntries(jar.getAll().map(({ name, value }) => [name, value])),
    headers: Object.fromEntries(sent.entries()),
  };
  const token = await getToken({ req: request as unknown as NextRequest });
  const secret = process.env.NEXTAUTH_SECRET;
  if (!token || !secret || typeof token.personId !== 'string') return false;
  const { personId } = token;
  const moved = await withScope('auth', (tx) => sessionOf(tx, personId, workshopId));
  if (!moved || moved.sessionEpoch !== token.sessionEpoch) return false;
  const value = await encode({ token: { ...token, workshopId: moved.workshopId }, secret, maxAge: SESSION_SECONDS });
  jar.set(cookieName(), value, {
    httpOnly: true,
    sameSite: 'lax',
    path: '/',
    secure: isSecure(),
    maxAge: SESSION_SECONDS,
  });
  return true;
}
