/**
 * next-auth: signed session tokens (no session table), so that any web process reads what another wrote. A token holds
 * person, workshop and the person's session epoch; roles are read from the database with every request, and raising
 * the epoch ends all sessions at once.
 */
import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { withScope } from '@/db/client';
import { log } from '@/lib/api/log';
import { Refusal } from '@/lib/api/problem';
import { type SignedIn, sessionOf, signInByLink, signInByPassword } from './sign-in';

const SESSION_SECONDS = 12 * 60 * 60;

function isSignedIn(user: unknown): user is SignedIn {
  return user !== null && typeof user === 'object' && 'workshopId' in user && 'sessionEpoch' in user;
}

export const authOptions: NextAuthOptions = {
  session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
  pages: { signIn: '/sign-in', error: '/sign-in' },
  providers: [
    CredentialsProvider({
      id: 'password',
      name: 'E-mail and password',
      credentials: { email: { label: 'E-mail', type: 'email' }, password: { label: 'Password', type: 'password' } },
      async authorize(credentials, request) {
        const forwarded: unknown = request.headers?.['x-forwarded-for'];
        const address = typeof forwarded === 'string' ? (forwarded.split(',').at(-1)?.trim() ?? 'unknown') : 'unknown';
        try {
          return await signInByPassword(String(credentials?.email ?? ''), String(credentials?.password ?? ''), address);
        } catch (error) {
          // The message reaches the page as the error code, so it names the case and nothing else.
          if (error instanceof Refusal && error.code === 'too-many') throw new Error('too-many');
          log.error({ err: error }, 'sign-in failed');
          throw new Error('away');
        }
      },
    }),
    CredentialsProvider({
      id: 'link',
      name: 'Link by e-mail',
      credentials: { token: { label: 'Token', type: 'text' } },
      authorize: (credentials) => signInByLink(String(credentials?.token ?? '')),
    }),
  ],
  callbacks: {
    async jwt({ token, user, trigger, session }) {
      if (isSignedIn(user)) {
        return {
          ...token,
          sub: user.id,
          personId: user.id,
          workshopId: user.workshopId,
          sessionEpoch: user.sessionEpoch,
        };
      }
      if (
        trigger === 'update' &&
        typeof token.personId === 'string' &&
        session &&
        typeof session.workshopId === 'string'
      ) {
        const { personId } = token;
        const asked: string = session.workshopId;
        if (!/^[0-9a-f-]{36}$/.test(asked)) return token;
        // Only into a workshop that the person belongs to; otherwise they stay where they are.
        const moved = await withScope('auth', (tx) => sessionOf(tx, personId, asked));
        if (moved && moved.sessionEpoch === token.sessionEpoch) return { ...token, workshopId: moved.workshopId };
      }
      return token;
    },
    // Only ever back to a page of our own (no open redirect).
    redirect({ url, baseUrl }) {
      if (url.startsWith('/') && !url.startsWith('//') && !url.startsWith('/\\')) return `${baseUrl}${url}`;
      return URL.canParse(url) && new URL(url).origin === new URL(baseUrl).origin ? url : baseUrl;
    },
  },
  logger: {
    error: (code, detail) => log.warn({ code, err: detail instanceof Error ? detail : undefined }, 'next-auth'),
    warn: (code) => log.debug({ code }, 'next-auth'),
    debug: () => undefined,
  },
};
