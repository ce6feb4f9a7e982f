/**
 * Before every page: a Content-Security-Policy with a fresh nonce, and the way to sign-in for who has no session.
 * The API answers for itself (lib/api/route.ts), since it also takes bearer tokens and has addresses for strangers.
 * A session is only recognised here; whether it still holds is checked with the roles inside each use case.
 */
import { getToken } from 'next-auth/jwt';
import { type NextRequest, NextResponse } from 'next/server';

const PUBLIC_PAGES = ['/sign-in', '/password-reset', '/invitation', '/look', '/problems'];

export async function proxy(request: NextRequest): Promise<NextResponse> {
  const { pathname, search } = request.nextUrl;
  if (pathname.startsWith('/api/')) return withSafeHeaders(NextResponse.next());
  const isPublic = PUBLIC_PAGES.some((page) => pathname === page || pathname.startsWith(`${page}/`));
  if (!isPublic && !(await getToken({ req: request }))) {
    const signIn = new URL('/sign-in', process.env.NEXTAUTH_URL ?? request.url);
    if (pathname !== '/') signIn.searchParams.set('next', `${pathname}${search}`);
    return withSafeHeaders(NextResponse.redirect(signIn));
  }
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString('base64');
  const policy = contentSecurityPolicy(nonce);
  const headers = new Headers(request.headers);
  // Next.js reads the nonce for its own scripts from this request header.
  headers.set('content-security-policy', policy);
  headers.set('x-nonce', nonce);
  const response = withSafeHeaders(NextResponse.next({ request: { headers } }));
  response.headers.set('content-security-policy', policy);
  return response;
}

/** Set at run time: the upload store's address is configuration, and headers() of the config are baked at build. */
function contentSecurityPolicy(nonce: string): string {
  const development = process.env.NODE_ENV === 'development';
  const store = uploadOrigin();
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ''}`,
    // The grid sizes its rows and columns through style attributes; scripts stay under the nonce.
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    `connect-src 'self'${store ? ` ${store}` : ''}${development ? ' ws:' : ''}`,
    "frame-src 'none'",
    "frame-ancestors 'none'",
    "form-action 'self'",
    "base-uri 'none'",
    "object-src 'none'",
  ].join('; ');
}

function uploadOrigin(): string | null {
  const redirected = process.env.UPLOADTHING_INGEST_URL;
  if (redirected && URL.canParse(redirected)) return new URL(redirected).origin;
  return process.env.OHMSTEAD_SERVICES === 'live' ? 'https://*.uploadthing.com' : null;
}

function withSafeHeaders(response: NextResponse): NextResponse {
  response.headers.set('x-content-type-options', 'nosniff');
  response.headers.set('referrer-policy', 'same-origin');
  response.headers.set('x-frame-options', 'DENY');
  response.headers.set('permissions-policy', 'camera=(self), microphone=(), geolocation=()');
  return response;
}

export const config = {
  // Static files need neither a session nor a policy.
  matcher: ['/((?!_next/static|_next/image|fonts/|favicon|icon).*)'],
};
