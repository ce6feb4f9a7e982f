import type { Metadata } from 'next';
import { PageTitle } from '@/components/ui/page-title';
import { SignInForm } from '@/components/workshop/sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

/** Only a path of our own is followed after signing in. */
function ownPath(next: string | string[] | undefined): string {
  return typeof next === 'string' && /^\/(?![/\\])/.test(next) ? next : '/';
}

export default async function SignInPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ next?: string | string[] }>;
}) {
  const { next } = await searchParams;
  return (
    <>
      <PageTitle title="Ohmstead" remainder="sign in" facts={['Parts list in, kit on the bench, drawers restocked.']} />
      <SignInForm next={ownPath(next)} />
    </>
  );
}
