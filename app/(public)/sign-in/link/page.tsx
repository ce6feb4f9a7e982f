import type { Metadata } from 'next';
import { PageTitle } from '@/components/ui/page-title';
import { LinkSignIn } from '@/components/workshop/link-sign-in';

export const metadata: Metadata = { title: 'Sign in by link' };

export default function LinkPage() {
  return (
    <>
      <PageTitle title="Ohmstead" remainder="sign in by link" />
      <LinkSignIn />
    </>
  );
}
